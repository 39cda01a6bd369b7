package org.minorant.bounds;

import java.util.Optional;
import org.minorant.core.Enclosure;

/**
 * A family of functions E of s of which the largest of E(s) − sR is an exponent, over an interval from {@link #first} to {@link #last} or without end: each of them is a mean Σ P(x) g_x(s), in weights of its
 * own, or less, of concave functions g_x that every point gives tangents of; one of them, at least, has a known value there.
 */
interface ExponentFamily {

    /** Where s begins, with what is known there. */
    ExponentPoint first();

    /** Where s ends; empty if it has no end. */
    Optional<Double> last();

    /** What is known at s. */
    ExponentPoint at(double s);

    /** The limit of one member's value as s grows without end, from below; 0 if none is known. */
    Enclosure limit();

    /** The slope that members surely keep as s grows without end; 0 if none is known. */
    Enclosure lastSlope(ExponentPoint far);
}
