/**
 * Suprema and crossings of concave curves, certified from few values.
 *
 * <p>A {@link org.minorant.core.curve.Curve} answers enclosures of its values, and may bring a {@link org.minorant.core.curve.Guess}. {@link
 * org.minorant.core.curve.SupportLines} encloses the suprema of F(t) − at, {@link org.minorant.core.curve.CurveRoot} the point where F crosses a level.
 * Guesses only decide where certified values are taken: a bad one costs width or values, never truth.
 */
package org.minorant.core.curve;
