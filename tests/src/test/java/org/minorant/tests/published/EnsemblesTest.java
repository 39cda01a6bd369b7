package org.minorant.tests.published;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.DensityOperator;
import org.minorant.measurement.Ensemble;
import org.minorant.measurement.PrettyGoodMeasurement;

/** Equiprobable pure qubit states, n copies: the square-root measurement. Source: computed by an independent program, unless a row says otherwise. */
class EnsemblesTest {

    /** n copies of a ket cos(θ/2)|0⟩ + e^{iφ} sin(θ/2)|1⟩ differ by about n rounding errors of the ket. */
    private static double rounding(int n) {
        return n * 0x1p-49;
    }

    private static DensityOperator copies(double theta, double phi, int n) {
        double[] re = {1};
        double[] im = {0};
        double[] kr = {Math.cos(theta / 2), Math.sin(theta / 2) * Math.cos(phi)};
        double[] ki = {0, Math.sin(theta / 2) * Math.sin(phi)};
        for (int c = 0; c < n; c++) {
            double[] r = new double[2 * re.length];
            double[] m = new double[2 * re.length];
            for (int i = 0; i < r.length; i++) {
                int j = i % 2;
                r[i] = re[i / 2] * kr[j] - im[i / 2] * ki[j];
                m[i] = re[i / 2] * ki[j] + im[i / 2] * kr[j];
            }
            re = r;
            im = m;
        }
        return DensityOperator.ofKet(re, im);
    }

    /** States on a great circle, evenly spaced. */
    private static List<DensityOperator> circle(int states, int n) {
        List<DensityOperator> list = new ArrayList<>();
        for (int k = 0; k < states; k++) {
            list.add(copies(2 * Math.PI * k / states, 0, n));
        }
        return list;
    }

    private static PrettyGoodMeasurement measurement(List<DensityOperator> states) {
        return PrettyGoodMeasurement.of(Ensemble.equiprobable(states));
    }

    @ParameterizedTest
    @CsvSource({
        "1, .666666666667",
        "2, .971404520791",
        "3, .991581623797",
        "4, .998102131254",
        "5, .999503686738",
        "6, .999878859588"
    })
    void trine(int n, String success) {
        Printed.of(success).isIn(measurement(circle(3, n)).successProbability(), rounding(n));
    }

    @ParameterizedTest
    @CsvSource({"1, .5", "2, .75", "3, .971404520791", "4, .991581623797", "5, .996903995000", "6, .998930038800"})
    void tetrahedron(int n, String success) {
        List<DensityOperator> states = new ArrayList<>();
        states.add(copies(0, 0, n));
        for (int k = 0; k < 3; k++) {
            states.add(copies(Math.acos(-1.0 / 3), 2 * Math.PI * k / 3, n));
        }
        Printed.of(success).isIn(measurement(states).successProbability(), rounding(n));
    }

    @ParameterizedTest
    @CsvSource({
        "1, .5",
        "2, .728553390593",
        "3, .933012701892",
        "4, .966216088618",
        "5, .984122918276",
        "6, .992045577703"
    })
    void fourStatesAtRightAngles(int n, String success) {
        Printed.of(success).isIn(measurement(circle(4, n)).successProbability(), rounding(n));
    }

    /** Minimum-error success 2/3: published, a common textbook value; the square-root measurement attains it. */
    @Test
    void theTrineIsToldApartAtBestTwoTimesInThree() {
        PrettyGoodMeasurement m = measurement(circle(3, 1));
        Printed.of("0.66666666666666666").isIn(m.successProbability(), rounding(1));
    }

    /** (3 + 2√2)/6 and 1.36907 bit: Peres and Wootters, PRL 66, 1119 (1991), as quoted; computed 1.3690684229. */
    @Test
    void theDoubleTrineYieldsTheInformationOfPeresAndWootters() {
        PrettyGoodMeasurement m = measurement(circle(3, 2));
        Printed.of("0.9714045207910317").isIn(m.successProbability(), rounding(2));
        Printed.of("1.3690684229")
                .isIn(m.jointDistribution().mutualInformation().bits(), 1e-13);
    }
}
