package org.minorant.core.pair;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * The recursion against Wigner's sum over binomials (E. P. Wigner, Group Theory, 1959, eq. 15.27, from memory), evaluated with 150 digits:
 * C_ab = √(C(k,a)/C(k,b)) Σ_i C(a,i) C(k−a,b−i) (−1)^i c^(k−a−b+2i) s^(a+b−2i), up to the sign convention fixed by C^(1) = [[c, s], [s, −c]].
 */
class SpinOverlapsTest {

    private static final MathContext DIGITS = new MathContext(150);

    @ParameterizedTest
    @CsvSource({
        "1, 0.6, 2, 2",
        "2, 0.6, 3, 3",
        "7, 0.3, 8, 8",
        "30, 0.05, 12, 20",
        "30, 0.95, 31, 31",
        "100, 0.4, 30, 25",
        "120, 0.7, 20, 40",
        "101, 0.001, 10, 40",
        "200, 0.7, 40, 60",
        "64, 0, 6, 5",
        "64, 1, 5, 65",
        "200, 0.3, 12, 9",
        "333, 0.05, 14, 14",
        "512, 0.9, 8, 20"
    })
    void entriesLieWithinTheirRadii(int k, double sine, int rows, int columns) {
        BigDecimal s = new BigDecimal(sine);
        DoubleDouble sin = DoubleDouble.of(sine);
        BigDecimal c = BigDecimal.ONE.subtract(s.multiply(s)).sqrt(DIGITS);
        SpinOverlaps steps = new SpinOverlaps(DoubleDouble.of(c), sin, rows, columns);
        while (steps.order() < k) {
            steps.step();
        }
        assertWithinRadii(steps.window(rows, columns), k, c, s);
        SpinOverlaps jumps = new SpinOverlaps(DoubleDouble.of(c), sin, rows, columns);
        jumps.advanceTo(k, () -> {});
        assertWithinRadii(jumps.window(rows, columns), k, c, s);
    }

    private static void assertWithinRadii(SpinOverlaps.Window w, int k, BigDecimal c, BigDecimal s) {
        BigDecimal[] powersOfC = powers(c, k);
        BigDecimal[] powersOfS = powers(s, k);
        int rows = w.high().length;
        int columns = w.high()[0].length;
        for (int a = 0; a < Math.min(rows, k + 1); a++) {
            for (int b = 0; b < Math.min(columns, k + 1); b++) {
                BigDecimal exact = wigner(k, a, b, powersOfC, powersOfS);
                BigDecimal found = new DoubleDouble(w.high()[a][b], w.low()[a][b]).toBigDecimal();
                double error = found.subtract(exact).abs().doubleValue();
                String where = "(" + a + ", " + b + ") " + exact.round(new MathContext(20)) + " but " + found;
                assertTrue(error <= w.radius()[a][b], where);
                assertTrue(w.radius()[a][b] <= 1e-25, where + " with the radius " + w.radius()[a][b]);
            }
        }
    }

    /** By doublings the same overlaps come out, within both radii, and hardly less accurate. */
    @ParameterizedTest
    @CsvSource({"1000, 0.4, 12, 9", "4097, 0.05, 20, 20", "3000, 0.001, 6, 30", "2047, 0.95, 30, 6", "5000, 0, 5, 4"})
    void doublingsAgreeWithSteps(int k, double sine, int rows, int columns) {
        BigDecimal s = new BigDecimal(sine);
        DoubleDouble c = DoubleDouble.of(BigDecimal.ONE.subtract(s.multiply(s)).sqrt(DIGITS));
        SpinOverlaps steps = new SpinOverlaps(c, DoubleDouble.of(sine), rows, columns);
        while (steps.order() < k) {
            steps.step();
        }
        SpinOverlaps jumps = new SpinOverlaps(c, DoubleDouble.of(sine), rows, columns);
        jumps.advanceTo(k, () -> {});
        assertEquals(k, jumps.order());
        SpinOverlaps.Window u = steps.window(rows, columns);
        SpinOverlaps.Window v = jumps.window(rows, columns);
        for (int a = 0; a < rows; a++) {
            for (int b = 0; b < columns; b++) {
                double apart = new DoubleDouble(u.high()[a][b], u.low()[a][b])
                        .minus(new DoubleDouble(v.high()[a][b], v.low()[a][b]))
                        .hi();
                assertTrue(Math.abs(apart) <= u.radius()[a][b] + v.radius()[a][b], a + ", " + b + ": " + apart);
                assertTrue(v.radius()[a][b] <= 1e-23, a + ", " + b + ": " + v.radius()[a][b]);
            }
        }
    }

    /** Far in the corner nothing cancels, so that even entries near 1e-200 keep 25 digits. */
    @ParameterizedTest
    @CsvSource({"1000, 0.78", "2000, 0.6"})
    void entriesInTheCornerKeepTheirDigits(int k, double sine) {
        BigDecimal s = new BigDecimal(sine);
        BigDecimal c = BigDecimal.ONE.subtract(s.multiply(s)).sqrt(DIGITS);
        SpinOverlaps overlaps = new SpinOverlaps(DoubleDouble.of(c), DoubleDouble.of(sine), 8, 8);
        while (overlaps.order() < k) {
            overlaps.step();
        }
        BigDecimal[] powersOfC = powers(c, k);
        BigDecimal[] powersOfS = powers(s, k);
        SpinOverlaps.Window w = overlaps.window(8, 8);
        for (int a = 0; a < 8; a++) {
            for (int b = 0; b < 8; b++) {
                BigDecimal exact = wigner(k, a, b, powersOfC, powersOfS);
                BigDecimal found = new DoubleDouble(w.high()[a][b], w.low()[a][b]).toBigDecimal();
                double error = found.subtract(exact).abs().doubleValue();
                assertTrue(error <= w.radius()[a][b], a + ", " + b);
                assertTrue(w.radius()[a][b] <= 1e-24 * Math.abs(w.high()[a][b]), "radius at " + a + ", " + b);
            }
        }
    }

    private static BigDecimal[] powers(BigDecimal x, int k) {
        BigDecimal[] p = new BigDecimal[k + 1];
        p[0] = BigDecimal.ONE;
        for (int i = 1; i <= k; i++) {
            p[i] = p[i - 1].multiply(x, DIGITS);
        }
        return p;
    }

    private static BigDecimal wigner(int k, int a, int b, BigDecimal[] c, BigDecimal[] s) {
        BigDecimal sum = BigDecimal.ZERO;
        for (int i = Math.max(0, a + b - k); i <= Math.min(a, b); i++) {
            BigDecimal term = new BigDecimal(binomial(a, i).multiply(binomial(k - a, b - i)))
                    .multiply(c[k - a - b + 2 * i], DIGITS)
                    .multiply(s[a + b - 2 * i], DIGITS);
            sum = i % 2 == 0 ? sum.add(term) : sum.subtract(term);
        }
        BigDecimal ratio = new BigDecimal(binomial(k, a)).divide(new BigDecimal(binomial(k, b)), DIGITS);
        return sum.multiply(ratio.sqrt(DIGITS), DIGITS);
    }

    private static BigInteger binomial(int n, int k) {
        BigInteger x = BigInteger.ONE;
        for (int i = 0; i < k; i++) {
            x = x.multiply(BigInteger.valueOf(n - i)).divide(BigInteger.valueOf(i + 1));
        }
        return x;
    }
}
