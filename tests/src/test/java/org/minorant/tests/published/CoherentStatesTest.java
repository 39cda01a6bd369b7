package org.minorant.tests.published;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.Complex;
import org.minorant.core.DensityOperator;
import org.minorant.core.state.LightStates;
import org.minorant.core.state.Truncation;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.HypothesisPair;
import org.minorant.measurement.PrettyGoodMeasurement;

/** Alphabets of coherent states, N photons on average: minimum errors. Source: computed from Gram matrices by an independent program. */
class CoherentStatesTest {

    /** What is cut off moves each state by at most 2√tail in trace norm; amplitudes are rounded to double. */
    private static final double TAIL = 1e-30;

    private static final double INPUT = 4 * 1e-15 + 0x1p-48;

    private static List<DensityOperator> phases(int count, double photons) {
        List<DensityOperator> states = new ArrayList<>();
        // one dimension for all: that of the given tail, for they differ by a phase only
        int dimension = LightStates.coherent(new Complex(Math.sqrt(photons), 0), Truncation.ofTail(TAIL))
                .dimension();
        for (int k = 0; k < count; k++) {
            double turn = 2 * Math.PI * k / count;
            Complex alpha = new Complex(Math.sqrt(photons) * Math.cos(turn), Math.sqrt(photons) * Math.sin(turn));
            states.add(LightStates.coherent(alpha, Truncation.ofDimension(dimension))
                    .state());
        }
        return states;
    }

    /** ½(1 − √(1 − e^(−4N))). */
    @ParameterizedTest
    @CsvSource({
        ".1, 2.1291118362e-1",
        ".2, 1.2896393845e-1",
        ".5, 3.5063252484e-2",
        "1, 4.6000703696e-3",
        "2, 8.3872691604e-5",
        "4, 2.8133794e-8"
    })
    void twoOppositePhases(double photons, String error) {
        List<DensityOperator> s = phases(2, photons);
        Printed.of(error).isIn(HypothesisPair.of(s.get(0), s.get(1)).minimumError(0.5), INPUT);
    }

    /** Symmetric pure states: the square-root measurement is optimal. */
    @ParameterizedTest
    @CsvSource({
        ".1, .55672427895",
        ".2, .45938573769",
        ".5, .26174194954",
        "1, .092421415604",
        "2, 9.5531773673e-3",
        "4, 1.6780066e-4"
    })
    void fourPhases(double photons, String error) {
        Printed.of(error).isIn(squareRoot(phases(4, photons)), INPUT);
    }

    @ParameterizedTest
    @CsvSource({
        ".1, .77761120780",
        ".2, .72631939754",
        ".5, .60654342101",
        "1, .44880752087",
        "2, .22297009755",
        "4, .053006404611"
    })
    void eightPhases(double photons, String error) {
        Printed.of(error).isIn(squareRoot(phases(8, photons)), INPUT);
    }

    private static org.minorant.core.Enclosure squareRoot(List<DensityOperator> states) {
        return PrettyGoodMeasurement.of(Ensemble.equiprobable(states)).errorProbability();
    }

    /**
     * M pulse positions. ((M−1)/M²)(√(1+(M−1)e^(−N)) − √(1−e^(−N)))²: Yuen, Kennedy, Lax, IEEE Trans. IT 21, 125 (1975), from memory. The kets are the columns of
     * the root of the Gram matrix, which has 1 on the diagonal and e^(−N) elsewhere.
     */
    @ParameterizedTest
    @CsvSource({"4, 1, 8.052384772818e-2", "16, 1, 1.810907908716e-1", "64, 2, 7.153309707031e-2"})
    void pulsePositions(int m, double photons, String error) {
        double c = Math.exp(-photons);
        double apart = Math.sqrt(1 - c);
        double together = (Math.sqrt(1 + (m - 1) * c) - apart) / m;
        List<DensityOperator> states = new ArrayList<>();
        for (int k = 0; k < m; k++) {
            double[] ket = new double[m];
            java.util.Arrays.fill(ket, together);
            ket[k] += apart;
            states.add(DensityOperator.ofKet(ket));
        }
        Printed.of(error).isIn(squareRoot(states), m * 0x1p-51);
    }
}
