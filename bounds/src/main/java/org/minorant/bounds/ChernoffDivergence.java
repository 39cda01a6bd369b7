package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * The Chernoff divergence of two states with the exponent that attains it.
 *
 * @param value max over 0 ≤ s ≤ 1 of −ln Tr ρ^s σ^(1−s)
 * @param s the exponent of ρ at which the maximum was found, to use in a Chernoff bound
 * @param attainedWithin an enclosure of an exponent that attains the maximum exactly
 */
public record ChernoffDivergence(Information value, double s, Enclosure attainedWithin) {}
