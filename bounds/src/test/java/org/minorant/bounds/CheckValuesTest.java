package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * Exponents and divergences of two pairs of qubits, in nats, against values computed by an independent program in 100-digit arithmetic and
 * printed to twelve decimals
 * (status: computed; the Chernoff divergence of the first pair is ln 1.25 in closed form).
 *
 * <p>Tolerance: half a unit of the last printed digit, and 1e-14 for the rounding of the Bloch vectors (2e-16 times slopes below 50).
 */
class CheckValuesTest {

    private static final double PRINTED = 5e-13 + 1e-14;

    /** Bloch lengths 0.8 and 0.8 at a right angle. */
    private static final DensityOperator[] P1 = pair(0.8, 0.8, Math.PI / 2);

    /** Bloch lengths 0.9 and 0.5 at 60 degrees. */
    private static final DensityOperator[] P2 = pair(0.9, 0.5, Math.PI / 3);

    private static DensityOperator[] pair(double first, double second, double angle) {
        return new DensityOperator[] {
            DensityOperator.ofBloch(0, 0, first),
            DensityOperator.ofBloch(second * Math.sin(angle), 0, second * Math.cos(angle))
        };
    }

    private static void check(double printed, Enclosure value) {
        assertTrue(
                value.lower() <= printed + PRINTED && value.upper() >= printed - PRINTED,
                () -> value.toIntervalString(17) + " is not " + printed);
        assertTrue(value.relativeWidth() <= 1e-15, () -> value.toIntervalString(17) + " is too wide");
    }

    private static void check(double printed, Information value) {
        check(printed, value.nats());
    }

    @Test
    void chernoff() {
        check(Math.log(1.25), Divergences.chernoff(P1[0], P1[1]).value());
        check(0.121144574995, Divergences.chernoff(P2[0], P2[1]).value());
        assertEquals(0.5, Divergences.chernoff(P1[0], P1[1]).s(), 1e-12);
        assertEquals(0.44585, Divergences.chernoff(P2[0], P2[1]).s(), 5e-6);
    }

    @Test
    void relativeEntropyAndVariance() {
        check(0.878889830934, Divergences.relativeEntropy(P1[0], P1[1]));
        check(0.391285208490, Divergences.relativeEntropy(P2[0], P2[1]));
        check(1.641450586705, Divergences.relativeEntropyVariance(P1[0], P1[1]));
        check(0.498794341736, Divergences.relativeEntropyVariance(P2[0], P2[1]));
    }

    @Test
    void petz() {
        double[] alpha = {0.25, 0.5, 0.75, 1.5, 2};
        double[] first = {0.222334949841, 0.446287102628, 0.667004849524, 1.248308618146, 1.516347489368};
        double[] second = {0.133580175829, 0.239431378911, 0.323131294692, 0.501304227817, 0.595166772200};
        for (int i = 0; i < alpha.length; i++) {
            check(first[i], Divergences.petzRenyi(P1[0], P1[1], alpha[i]));
            check(second[i], Divergences.petzRenyi(P2[0], P2[1], alpha[i]));
        }
    }

    @Test
    void sandwiched() {
        double[] alpha = {0.5, 0.75, 1.5, 2, 3};
        double[] first = {0.385662480812, 0.648399285290, 1.187043579624, 1.346629104727, 1.484776555060};
        double[] second = {0.221587436587, 0.318265127403, 0.483556426023, 0.533455961318, 0.580877218082};
        for (int i = 0; i < alpha.length; i++) {
            check(first[i], Divergences.sandwichedRenyi(P1[0], P1[1], alpha[i]));
            check(second[i], Divergences.sandwichedRenyi(P2[0], P2[1], alpha[i]));
        }
    }

    @Test
    void hoeffding() {
        double[] rate = {0.05, 0.1, 0.2};
        double[] first = {0.517359545912, 0.394141131089, 0.247535251814};
        double[] second = {0.251500756883, 0.150190606312, 0.050254088309};
        for (int i = 0; i < rate.length; i++) {
            check(first[i], Divergences.hoeffding(P1[0], P1[1], Information.ofNats(rate[i])));
            check(second[i], Divergences.hoeffding(P2[0], P2[1], Information.ofNats(rate[i])));
        }
    }

    @Test
    void strongConverse() {
        double[] factor = {1.2, 1.5};
        double[] first = {0.008994328242, 0.053458178452};
        double[] second = {0.005829977386, 0.034470576824};
        double d1 = Divergences.relativeEntropy(P1[0], P1[1]).nats().midpoint();
        double d2 = Divergences.relativeEntropy(P2[0], P2[1]).nats().midpoint();
        for (int i = 0; i < factor.length; i++) {
            check(first[i], Divergences.strongConverse(P1[0], P1[1], Information.ofNats(factor[i] * d1)));
            check(second[i], Divergences.strongConverse(P2[0], P2[1], Information.ofNats(factor[i] * d2)));
        }
    }
}
