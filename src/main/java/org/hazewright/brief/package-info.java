/**
 * What is wanted: targets with tolerances, tissue-like targets, batch, balance and the limits of the search.
 *
 * <p>Values only. Start with {@link org.hazewright.brief.Brief}.
 */
package org.hazewright.brief;
