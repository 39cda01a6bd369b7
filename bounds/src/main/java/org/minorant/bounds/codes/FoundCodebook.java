package org.minorant.bounds.codes;

import org.minorant.core.Enclosure;

/**
 * A codebook that a search found.
 *
 * @param codebook the codebook; its coefficients make it again
 * @param error its average error under the pretty-good measurement
 * @param bound what the error does not exceed: f(M − 1), unless another number was given
 * @param draws how many codebooks were drawn, this one included
 */
public record FoundCodebook(Codebook codebook, Enclosure error, Enclosure bound, int draws) {}
