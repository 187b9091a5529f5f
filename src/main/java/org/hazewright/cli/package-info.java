/**
 * The commands: thin, one file each. Data go to standard output, progress and messages to standard error, and one place turns a
 * failure into an exit status.
 *
 * <p>Start with {@link org.hazewright.cli.Hazewright}.
 */
package org.hazewright.cli;
