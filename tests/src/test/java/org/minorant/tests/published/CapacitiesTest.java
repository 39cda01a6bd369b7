package org.minorant.tests.published;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.function.DoubleFunction;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.core.Complex;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.state.LightStates;
import org.minorant.core.state.Truncation;

/** Capacities in bits, of channels with given letters and of qubit channels by a search over letters. Sources beside each row. */
class CapacitiesTest {

    /** Computed: h of the eigenvalues ½(1 ± e^(−2N)). */
    @ParameterizedTest
    @CsvSource({".01, .0801338764", ".1, .4385845677", ".2, .6457635983", ".5, .9000455915", "1, .9867474300"})
    void twoOppositePhases(double photons, String bits) {
        double alpha = Math.sqrt(photons);
        Truncation cut = Truncation.ofDimension(LightStates.coherent(new Complex(alpha, 0), Truncation.ofTail(1e-30))
                .dimension());
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(
                LightStates.coherent(new Complex(alpha, 0), cut).state(),
                LightStates.coherent(new Complex(-alpha, 0), cut).state());
        Printed.of(bits).isIn(channel.capacity().value().bits(), 1e-13);
    }

    /** log2(5/4): closed form. */
    @Test
    void zChannelAtOneHalf() {
        ClassicalQuantumChannel channel =
                ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {0.5, 0.5}});
        Printed.of("0.3219280949").isIn(channel.capacity().value().bits(), 1e-14);
    }

    /** Fuchs, PRL 79, 1162 (1997): 0.4717, from memory; computed 0.4717293906. Amplitude damping, γ = ½, the best two inputs. */
    @Test
    void amplitudeDampingWithItsBestTwoInputs() {
        DoubleFunction<DensityOperator> output =
                theta -> DensityOperator.ofBloch(Math.sin(theta) * Math.sqrt(0.5), 0, 0.5 * Math.cos(theta) + 0.5);
        Printed.of("0.4717293906").isIn(largest(t -> capacity(output.apply(t), output.apply(-t)), 0.5, 3), 1e-11);
    }

    /** King, Nathanson, Ruskai, PRL 88, 057901 (2002): 0.3249901 with three inputs, computed .321928094887 and .320157257504 with two. */
    @Test
    void aQubitChannelThatNeedsThreeInputs() {
        DoubleFunction<DensityOperator> output =
                theta -> DensityOperator.ofBloch(0.6 * Math.sin(theta), 0, 0.5 * Math.cos(theta) + 0.5);
        Enclosure three = largest(t -> capacity(output.apply(0), output.apply(t), output.apply(-t)), 0.5, 3);
        Printed.of("0.3249901").isIn(three, 1e-9);
        Enclosure poles = capacity(DensityOperator.ofBloch(0, 0, 1), DensityOperator.ofBloch(0, 0, 0));
        Printed.of(".321928094887").isIn(poles, 1e-13);
        Printed.of(".320157257504").isIn(largest(t -> capacity(output.apply(t), output.apply(-t)), 0.5, 3), 1e-11);
        assertTrue(poles.isCertainlyBelow(three));
    }

    private static Enclosure capacity(DensityOperator... letters) {
        return ClassicalQuantumChannel.of(letters).capacity().value().bits();
    }

    /** The largest value of a unimodal function by golden sections: within the square of the last interval, about 1e-12. */
    private static Enclosure largest(DoubleFunction<Enclosure> f, double from, double to) {
        double ratio = (Math.sqrt(5) - 1) / 2;
        double a = from;
        double b = to;
        double x = b - ratio * (b - a);
        double y = a + ratio * (b - a);
        Enclosure fx = f.apply(x);
        Enclosure fy = f.apply(y);
        while (b - a > 1e-6) {
            if (fx.midpoint() > fy.midpoint()) {
                b = y;
                y = x;
                fy = fx;
                x = b - ratio * (b - a);
                fx = f.apply(x);
            } else {
                a = x;
                x = y;
                fx = fy;
                y = a + ratio * (b - a);
                fy = f.apply(y);
            }
        }
        return fx.max(fy);
    }
}
