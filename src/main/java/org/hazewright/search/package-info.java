/**
 * The numbers under a design: the best set out of many, and the proof that no other is better.
 *
 * <p>Plain arrays in, plain arrays out: a {@link org.hazewright.search.SetProblem} holds targets, columns and limits without knowing
 * what an ingredient, a brief or a bottle is. {@link org.hazewright.search.ConvexProgramme} solves one set by a dual active-set method,
 * {@link org.hazewright.search.SetSearch} goes over all of them by bounds, {@link org.hazewright.search.LimitProof} says why no set comes
 * closer. No physics, no file and no name of a substance belongs here. Start with {@link org.hazewright.search.SetSearch}.
 */
package org.hazewright.search;
