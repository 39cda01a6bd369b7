package org.minorant.measurement;

import org.minorant.core.WideDouble;

/**
 * A corner of a polygon in the plane of the two errors.
 *
 * @param typeOneError the type-I error, between 0 and 1
 * @param typeTwoError the type-II error there
 */
public record TradeOffPoint(double typeOneError, WideDouble typeTwoError) {}
