package org.minorant.bounds;

import java.util.List;
import org.minorant.core.Enclosure;

/**
 * What is known at one s.
 *
 * @param s where
 * @param value an enclosure of one member's value
 * @param lines a line for each letter x: all members at all s are at most the mean of them, in their weights
 * @param slope about the slope of the best member
 * @param caps for each letter a number that no mean's share of it exceeds at any s
 */
record ExponentPoint(double s, Enclosure value, List<ExponentLine> lines, double slope, Lazy<List<Enclosure>> caps) {

    ExponentPoint {
        lines = List.copyOf(lines);
    }
}
