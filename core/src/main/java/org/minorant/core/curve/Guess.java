package org.minorant.core.curve;

/**
 * What a curve is thought to be, without proof: cheap next to a certified value of the curve. Searches ask it where certified values are worth taking.
 *
 * <p>It may be wrong, rough, infinite or NaN anywhere. Logarithms, because t and the values range over hundreds of decades.
 */
@FunctionalInterface
public interface Guess {

    /**
     * Guesses the logarithm of a value.
     *
     * @param lnT ln t
     * @return about ln F(t)
     */
    double lnValue(double lnT);
}
