package org.minorant.core.state;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.MathContext;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.Complex;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;
import org.minorant.core.pair.PositivePair;

class LightStatesTest {

    private static final MathContext DIGITS = new MathContext(80);

    private static final Complex NONE = new Complex(0, 0);

    private static Complex real(double x) {
        return new Complex(x, 0);
    }

    /** e^−x for x = k/2^20 ≥ 0 by squaring a series, in 80 digits. */
    static BigDecimal expMinus(BigDecimal x) {
        int halvings = 0;
        BigDecimal y = x;
        while (y.compareTo(new BigDecimal("0.001")) > 0) {
            y = y.divide(BigDecimal.valueOf(2), DIGITS);
            halvings++;
        }
        BigDecimal sum = BigDecimal.ONE;
        BigDecimal term = BigDecimal.ONE;
        for (int k = 1; k < 40; k++) {
            term = term.multiply(y, DIGITS).divide(BigDecimal.valueOf(-k), DIGITS);
            sum = sum.add(term, DIGITS);
        }
        for (int k = 0; k < halvings; k++) {
            sum = sum.multiply(sum, DIGITS);
        }
        return sum;
    }

    /** Poisson probabilities of the exact mean |α|², in 80 digits. */
    private static BigDecimal[] poisson(Complex alpha, int count) {
        BigDecimal mean = new BigDecimal(alpha.re()).pow(2).add(new BigDecimal(alpha.im()).pow(2));
        BigDecimal[] p = new BigDecimal[count];
        p[0] = expMinus(mean);
        for (int n = 1; n < count; n++) {
            p[n] = p[n - 1].multiply(mean, DIGITS).divide(BigDecimal.valueOf(n), DIGITS);
        }
        return p;
    }

    @ParameterizedTest
    @CsvSource({"0.3,0,1e-6", "1,0,1e-12", "-0.6,0.8,1e-30", "3,-4,1e-20", "31.622776601683793,0,1e-12"})
    void coherentLightIsPoissonWithCertifiedTail(double re, double im, double tail) {
        Complex alpha = new Complex(re, im);
        TruncatedState c = LightStates.coherent(alpha, Truncation.ofTail(tail));
        int d = c.dimension();
        BigDecimal[] p = poisson(alpha, 3 * d + 100);
        BigDecimal beyond = BigDecimal.ZERO;
        for (int n = p.length - 1; n >= d; n--) {
            beyond = beyond.add(p[n], DIGITS);
        }
        assertTrue(c.discardedWeight().contains(beyond), c.discardedWeight() + " " + beyond);
        assertTrue(c.discardedWeight().upper() <= tail);
        assertTrue(c.discardedWeight().relativeWidth() < 1e-7);
        // one photon number fewer would discard too much
        assertTrue(beyond.add(p[d - 1]).doubleValue() > tail);
        double kept = 1 - beyond.doubleValue();
        for (int n = 0; n < d; n++) {
            double expected = p[n].doubleValue() / kept;
            assertEquals(expected, c.state().re(n, n), 4e-16 * expected + Double.MIN_VALUE, "photon number " + n);
        }
        assertEquals(1, c.state().factor().rank());
        assertEquals(0, c.state().factor().traceError());
        // for pure states the trace distance is the root of the weight cut off
        assertEquals(Math.sqrt(beyond.doubleValue()), c.traceDistanceBound(), 1e-8 * c.traceDistanceBound());
        assertTrue(c.traceDistanceBound() >= Math.sqrt(beyond.doubleValue()));
    }

    @Test
    void brightCoherentLightKeepsItsVacuumAmplitude() {
        DensityOperator rho = LightStates.coherent(real(31.622776601683793), Truncation.ofTail(1e-12))
                .state();
        double vacuum = rho.factor().columns().re(0, 0);
        // e^−500, with the mean of the rounded amplitude within 1e-13 of 1000
        assertEquals(StrictMath.exp(-500), vacuum, 1e-12 * vacuum);
    }

    @Test
    void phasesOfCoherentLight() {
        Complex alpha = new Complex(0.5, -1.25);
        DensityOperator rho =
                LightStates.coherent(alpha, Truncation.ofTail(1e-25)).state();
        // ⟨n|ρ|n−1⟩ = ρ_(n−1,n−1) α/√n
        for (int n = 1; n < rho.dimension(); n++) {
            double below = rho.re(n - 1, n - 1);
            assertEquals(below * alpha.re() / Math.sqrt(n), rho.re(n, n - 1), 4e-16 * below);
            assertEquals(below * alpha.im() / Math.sqrt(n), rho.im(n, n - 1), 4e-16 * below);
        }
    }

    @Test
    void overlapOfCoherentStates() {
        Truncation t = Truncation.ofDimension(40);
        DensityOperator a = LightStates.coherent(new Complex(0.3, 0.7), t).state();
        DensityOperator b = LightStates.coherent(new Complex(-1, 0.25), t).state();
        double overlap = a.times(b).trace().re();
        assertEquals(Math.exp(-(1.3 * 1.3 + 0.45 * 0.45)), overlap, 1e-15);
    }

    /**
     * Two opposite phases: ½(1 − √(1 − e^(−4N))) (published: Helstrom 1976; digits computed from Gram matrices). The states used differ
     * from the ideal ones by their bounds, hence the sums by half of both; α is rounded, which moves N by 2^-52 N.
     */
    @ParameterizedTest
    @CsvSource({
        "0.1,2.1291118362e-1",
        "0.2,1.2896393845e-1",
        "0.5,3.5063252484e-2",
        "1,4.6000703696e-3",
        "2,8.3872691604e-5",
        "4,2.8133794e-8"
    })
    void minimumErrorOfTwoOppositePhases(double mean, BigDecimal published) {
        Truncation t = Truncation.ofTail(1e-30);
        TruncatedState plus = LightStates.coherent(real(Math.sqrt(mean)), t);
        TruncatedState minus = LightStates.coherent(real(-Math.sqrt(mean)), t);
        Enclosure error = PositivePair.of(plus.state(), minus.state()).traceMinimum(0.5, 0.5);
        double overlap = Math.exp(-4 * mean);
        double exact = 0.5 * overlap / (1 + Math.sqrt(1 - overlap));
        double slack = (plus.traceDistanceBound() + minus.traceDistanceBound()) / 2 + exact * 1e-14;
        assertTrue(error.widen(slack).contains(exact), error + " " + exact);
        // half a unit of the last digit given
        double rounding = published.ulp().doubleValue() / 2 + slack;
        assertEquals(published.doubleValue(), error.midpoint(), rounding);
    }

    @ParameterizedTest
    @CsvSource({"1e-3,1e-9", "0.7,1e-12", "2.5,1e-12", "40,1e-6", "1e-200,1e-30"})
    void thermalLightIsGeometric(double mean, double tail) {
        TruncatedState t = LightStates.thermal(mean, Truncation.ofTail(tail));
        int d = t.dimension();
        BigDecimal m = new BigDecimal(mean);
        BigDecimal x = m.divide(m.add(BigDecimal.ONE), DIGITS);
        BigDecimal cut = x.pow(d, DIGITS);
        assertTrue(t.discardedWeight().contains(cut), t.discardedWeight() + " " + cut);
        assertTrue(t.discardedWeight().relativeWidth() < 1e-15);
        assertTrue(cut.doubleValue() <= tail);
        assertTrue(d == 1 || cut.divide(x, DIGITS).doubleValue() > tail);
        BigDecimal norm = BigDecimal.ONE.subtract(cut);
        double photons = 0;
        for (int n = 0; n < d; n++) {
            double expected = x.pow(n, DIGITS)
                    .multiply(BigDecimal.ONE.subtract(x), DIGITS)
                    .divide(norm, DIGITS)
                    .doubleValue();
            assertEquals(expected, t.state().re(n, n), Math.ulp(expected));
            photons += n * t.state().re(n, n);
        }
        // the mean of a geometric law cut at d: m − d x^d/(1 − x^d)
        double w = cut.doubleValue();
        assertEquals(mean - d * w / (1 - w), photons, 1e-14 * mean * d);
        assertEquals(w, t.traceDistanceBound(), 3e-16 + w * 1e-15);
        assertTrue(t.traceDistanceBound() >= w);
    }

    @Test
    void thermalLightByDimensionMayDiscardWeightsBelowEveryDouble() {
        TruncatedState t = LightStates.thermal(1e-3, Truncation.ofDimension(200));
        BigDecimal x = new BigDecimal(1e-3).divide(new BigDecimal(1e-3).add(BigDecimal.ONE), DIGITS);
        assertTrue(t.discardedWeight().contains(x.pow(200, DIGITS)));
        assertTrue(t.discardedWeight().lnUpper() < -1381);
    }

    /** The vacuum in every family. */
    @Test
    void vacuum() {
        TruncatedState v = LightStates.thermal(0, Truncation.ofTail(1e-12));
        assertEquals(1, v.dimension());
        assertEquals(Enclosure.ZERO, v.discardedWeight());
        assertEquals(0, v.traceDistanceBound());
        assertEquals(v, LightStates.coherent(NONE, Truncation.ofTail(1e-12)));
        assertEquals(
                1,
                LightStates.squeezedVacuum(NONE, Truncation.ofDimension(3))
                        .state()
                        .re(0, 0));
    }

    /** |c_2n|² = (2n)! tanh^2n r / (4^n n!² cosh r), phase (−e^iθ)^n; Yuen 1976 (memory). */
    @ParameterizedTest
    @CsvSource({"0.5,0", "0.3,-0.4", "-1.1,0.2", "0,1e-9"})
    void squeezedVacuumHasItsClosedForm(double re, double im) {
        double r = Math.hypot(re, im);
        TruncatedState s = LightStates.squeezedVacuum(new Complex(re, im), Truncation.ofTail(1e-20));
        DensityOperator rho = s.state();
        double cr = 1 / Math.sqrt(Math.cosh(r));
        double ci = 0;
        double tr = -re / r * Math.tanh(r);
        double ti = -im / r * Math.tanh(r);
        double first = cr;
        for (int n = 0; 2 * n < s.dimension(); n++) {
            assertEquals(first * cr, rho.re(2 * n, 0), 1e-14 * first);
            assertEquals(first * ci, rho.im(2 * n, 0), 1e-14 * first);
            double ratio = Math.sqrt((2 * n + 1.0) / (2 * n + 2.0));
            double x = (cr * tr - ci * ti) * ratio;
            ci = (cr * ti + ci * tr) * ratio;
            cr = x;
        }
        for (int n = 1; n < s.dimension(); n += 2) {
            assertEquals(0, rho.re(n, n));
        }
        assertEquals(1, rho.factor().rank());
        // what is cut off, from the closed form
        double p = 1 / Math.cosh(r);
        double beyond = 0;
        for (int n = 0; n < 4000; n++) {
            beyond += 2 * n >= s.dimension() ? p : 0;
            p *= Math.tanh(r) * Math.tanh(r) * (2 * n + 1.0) / (2 * n + 2.0);
        }
        assertEquals(beyond, s.discardedWeight().midpoint(), 1e-8 * beyond);
    }

    /**
     * ⟨n|ρ|m⟩ as the average of coherent states over a Gaussian (Glauber 1963), by the trapezoidal rule, which converges geometrically
     * here.
     */
    @ParameterizedTest
    @CsvSource({"0.8,-0.5,0.6", "2,0,0.1", "0,1,3"})
    void displacedThermalLightIsAMixtureOfCoherentStates(double re, double im, double m) {
        DensityOperator rho = LightStates.displacedThermal(new Complex(re, im), m, Truncation.ofTail(1e-28))
                .state();
        int top = 8;
        double[][] sumRe = new double[top][top];
        double[][] sumIm = new double[top][top];
        double step = Math.sqrt(m / (1 + m)) / 4;
        double h = step * step / (Math.PI * m);
        int reach = (int) (7 * Math.sqrt(m) / step);
        for (int a = -reach; a <= reach; a++) {
            for (int b = -reach; b <= reach; b++) {
                double x = re + a * step;
                double y = im + b * step;
                double w = h * Math.exp(-(a * a + b * b) * step * step / m - x * x - y * y);
                double[] cr = new double[top];
                double[] ci = new double[top];
                cr[0] = 1;
                for (int n = 1; n < top; n++) {
                    cr[n] = (cr[n - 1] * x - ci[n - 1] * y) / Math.sqrt(n);
                    ci[n] = (cr[n - 1] * y + ci[n - 1] * x) / Math.sqrt(n);
                }
                for (int i = 0; i < top; i++) {
                    for (int j = 0; j < top; j++) {
                        sumRe[i][j] += w * (cr[i] * cr[j] + ci[i] * ci[j]);
                        sumIm[i][j] += w * (ci[i] * cr[j] - cr[i] * ci[j]);
                    }
                }
            }
        }
        for (int i = 0; i < top; i++) {
            for (int j = 0; j < top; j++) {
                assertEquals(sumRe[i][j], rho.re(i, j), 1e-13);
                assertEquals(sumIm[i][j], rho.im(i, j), 1e-13);
            }
        }
    }

    /** Against exponentials of truncated generators, which are exact far from the edge of a large enough space. */
    @ParameterizedTest
    @CsvSource({"0.7,-0.4,0.3,0.2,0.35", "0,0,0.4,-0.1,0.2", "1.1,0.2,-0.5,0,0", "0.5,0.5,0,0,0.5"})
    void gaussianStatesAreWhatTheirOperatorsMake(double ar, double ai, double xr, double xi, double m) {
        int n = 90;
        Operator a = Exponential.annihilator(n);
        Operator c = a.adjoint();
        Operator d = Exponential.of(Exponential.times(c, ar, ai).minus(Exponential.times(a, ar, -ai)));
        Operator s = Exponential.of(
                Exponential.times(a.times(a), xr / 2, -xi / 2).minus(Exponential.times(c.times(c), xr / 2, xi / 2)));
        double[] p = new double[n];
        for (int k = 0; k < n; k++) {
            p[k] = Math.pow(m / (1 + m), k) / (1 + m);
        }
        Operator u = d.times(s);
        Operator expected = u.times(HermitianOperator.diagonal(p)).times(u.adjoint());
        TruncatedState state =
                LightStates.gaussian(new Complex(ar, ai), new Complex(xr, xi), m, Truncation.ofTail(1e-24));
        for (int i = 0; i < 20; i++) {
            for (int j = 0; j < 20; j++) {
                assertEquals(expected.re(i, j), state.state().re(i, j), 1e-11);
                assertEquals(expected.im(i, j), state.state().im(i, j), 1e-11);
            }
        }
    }

    /** Tr ρ² = 1/(2m+1) and ⟨a*a⟩ = |α|² + m cosh 2r + sinh² r, whatever the parameters (common textbook values). */
    @ParameterizedTest
    @CsvSource({
        "0,0,1,0,0",
        "0,0,0.8,0.6,0.4",
        "1,-2,0,0,0.7",
        "2,1,0.8,0.6,0.4",
        "12,0,0,0,0.1",
        "20,0,1,0,0",
        "20,0,-1,0,0",
        "0,0,0,0,3",
        "3,3,0,-1,1e-9"
    })
    void purityAndMeanPhotonNumber(double ar, double ai, double xr, double xi, double m) {
        TruncatedState t = LightStates.gaussian(new Complex(ar, ai), new Complex(xr, xi), m, Truncation.ofTail(1e-24));
        double r = Math.hypot(xr, xi);
        double purity = 0;
        double photons = 0;
        int d = t.dimension();
        for (int i = 0; i < d; i++) {
            photons += i * t.state().re(i, i);
            for (int j = 0; j < d; j++) {
                purity += Math.pow(t.state().re(i, j), 2) + Math.pow(t.state().im(i, j), 2);
            }
        }
        assertEquals(1 / (2 * m + 1), purity, 1e-12);
        double mean = ar * ar + ai * ai + m * Math.cosh(2 * r) + Math.pow(Math.sinh(r), 2);
        assertEquals(mean, photons, 1e-12 * (1 + mean));
        assertTrue(t.state().traceEnclosure().contains(1.0));
        assertTrue(t.discardedWeight().upper() <= 1e-24);
        assertTrue(t.traceDistanceBound() <= 1.0001e-12);
    }

    /** The bound against the distance to the same state on a much larger space. */
    @ParameterizedTest
    @CsvSource({
        "1,-0.5,0,0,0.5,14",
        "0,0,0.5,0.2,0.3,12",
        "1,1,0.4,-0.3,0.2,16",
        "1.5,0,0.5,0,0,12",
        "2,0,0,0,0,8",
        "0,0,0,0,1.5,9"
    })
    void traceDistanceStaysBelowItsBound(double ar, double ai, double xr, double xi, double m, int d) {
        Complex alpha = new Complex(ar, ai);
        Complex squeezing = new Complex(xr, xi);
        TruncatedState small = LightStates.gaussian(alpha, squeezing, m, Truncation.ofDimension(d));
        TruncatedState large = LightStates.gaussian(alpha, squeezing, m, Truncation.ofTail(1e-22));
        int n = large.dimension();
        double[][] re = new double[n][n];
        double[][] im = new double[n][n];
        double beyond = 0;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                boolean inside = i < d && j < d;
                re[i][j] = large.state().re(i, j) - (inside ? small.state().re(i, j) : 0);
                im[i][j] = large.state().im(i, j) - (inside ? small.state().im(i, j) : 0);
            }
            beyond += i >= d ? large.state().re(i, i) : 0;
        }
        double distance = 0;
        for (double v : HermitianOperator.of(re, im).eigenvalues()) {
            distance += Math.abs(v) / 2;
        }
        assertTrue(distance <= small.traceDistanceBound() + 1e-11, distance + " " + small.traceDistanceBound());
        assertTrue(distance >= beyond - 1e-13);
        assertTrue(small.discardedWeight().widen(1e-14).contains(beyond), small.discardedWeight() + " " + beyond);
        if (m == 0) {
            assertEquals(distance, small.traceDistanceBound(), 1e-8);
        }
    }

    @Test
    void smallStatesAndLargeOnesShareASpace() {
        TruncatedState large = LightStates.coherent(real(3), Truncation.ofTail(1e-12));
        TruncatedState small = LightStates.squeezedVacuum(real(0.3), Truncation.ofDimension(large.dimension()));
        assertEquals(large.dimension(), small.dimension());
        assertTrue(small.traceDistanceBound() < 1e-8);
        assertTrue(PositivePair.of(large.state(), small.state()).traceMinimum(1).upper() < 0.01);
    }

    @Test
    void parametersThatUnderflowGiveTheVacuum() {
        TruncatedState t = LightStates.gaussian(real(1e-200), real(1e-300), 1e-250, Truncation.ofDimension(4));
        assertEquals(1, t.state().re(0, 0));
        assertTrue(t.traceDistanceBound() < 1e-25);
        assertEquals(0, t.discardedWeight().lower());
    }

    @Test
    void theSameBitsWheneverAsked() {
        Truncation t = Truncation.ofTail(1e-12);
        assertEquals(
                LightStates.gaussian(new Complex(1, 2), new Complex(.5, .1), .3, t)
                        .state(),
                LightStates.gaussian(new Complex(1, 2), new Complex(.5, .1), .3, t)
                        .state());
    }

    @ParameterizedTest
    @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY})
    void parametersMustBeFinite(double bad) {
        Truncation t = Truncation.ofDimension(4);
        assertThrows(InvalidInputException.class, () -> LightStates.coherent(real(bad), t));
        assertThrows(InvalidInputException.class, () -> LightStates.coherent(new Complex(0, bad), t));
        assertThrows(InvalidInputException.class, () -> LightStates.squeezedVacuum(real(bad), t));
        assertThrows(InvalidInputException.class, () -> LightStates.squeezedCoherent(NONE, new Complex(0, bad), t));
        assertThrows(InvalidInputException.class, () -> LightStates.squeezedThermal(NONE, bad, t));
        assertThrows(InvalidInputException.class, () -> LightStates.thermal(bad, t));
        assertThrows(InvalidInputException.class, () -> LightStates.displacedThermal(NONE, bad, t));
        assertThrows(InvalidInputException.class, () -> Truncation.ofTail(bad));
    }

    @Test
    void limitsAreSaid() {
        Truncation t = Truncation.ofTail(1e-12);
        refused(
                "LightStates.thermal: the thermal photon number is -1.0, expected between 0.0 and 1.7976931348623157E308; give a number in that range",
                () -> LightStates.thermal(-1, t));
        refused(
                "LightStates.squeezedVacuum: the squeezing |xi| is 5.0, expected between 0.0 and 4.0; give a number in that range",
                () -> LightStates.squeezedVacuum(new Complex(3, 4), t));
        refused(
                "LightStates.coherent: the mean photon number is 40000.0, expected between 0.0 and 32768.0; give a number in that range",
                () -> LightStates.coherent(real(200), t));
        refused(
                "LightStates.squeezedVacuum: the state has weight beyond 16384 photon numbers, expected a state whose tail can be bounded there; lower "
                        + "the energy or the squeezing",
                () -> LightStates.squeezedVacuum(real(3.9), t));
        refused(
                "LightStates.thermal: the dimension 2 discards the weight 0.5625000000000001, expected at most 0.5; keep more photon numbers",
                () -> LightStates.thermal(3, Truncation.ofDimension(2)));
        InvalidInputException e = assertThrows(
                InvalidInputException.class, () -> LightStates.coherent(real(10), Truncation.ofDimension(60)));
        assertTrue(e.found().startsWith("the dimension 60 discards the weight 0.99999"), e.found());
        e = assertThrows(InvalidInputException.class, () -> LightStates.thermal(1e6, t));
        assertTrue(e.found().matches("the state takes \\d+ photon numbers"), e.found());
        e = assertThrows(InvalidInputException.class, () -> LightStates.thermal(1e300, t));
        assertTrue(e.found().matches("the state takes \\d+ photon numbers"), e.found());
        assertThrows(
                InvalidInputException.class, () -> LightStates.thermal(1, Truncation.ofDimension(Integer.MAX_VALUE)));
        refused(
                "Truncation.ofTail: the weight is 1.0E-40, expected between 1.0E-30 and 0.5; ask for a weight in that range",
                () -> Truncation.ofTail(1e-40));
        refused(
                "Truncation.ofDimension: the dimension is 0, expected at least 1; keep the vacuum at least",
                () -> Truncation.ofDimension(0));
    }

    private static void refused(String message, org.junit.jupiter.api.function.Executable action) {
        assertEquals(message, assertThrows(InvalidInputException.class, action).getMessage());
    }

    @Test
    void truncationsSayWhatTheyAre() {
        assertEquals("tail weight 1.0E-9", Truncation.ofTail(1e-9).toString());
        assertEquals("dimension 7", Truncation.ofDimension(7).toString());
    }
}
