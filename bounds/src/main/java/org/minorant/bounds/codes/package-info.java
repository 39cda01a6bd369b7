/**
 * Codes that one can hold: {@link org.minorant.bounds.codes.Codebook}s with their words, the {@link org.minorant.bounds.codes.CodebookFamily} of pairwise independent ones that affine maps over finite fields make for a
 * {@link org.minorant.bounds.codes.RationalInput}, their true error from {@link org.minorant.bounds.codes.PrettyGoodDecoder}, and {@link org.minorant.bounds.codes.CodebookSearch}, which finds one that keeps the
 * random-coding bound.
 */
package org.minorant.bounds.codes;
