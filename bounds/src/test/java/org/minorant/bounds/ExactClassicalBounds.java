package org.minorant.bounds;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * Bounds of classical channels in decimal arithmetic of 60 digits, written down without the library: dependence testing with M − 1, its
 * inverse by bisection, and the converse as a piecewise-linear maximisation over all its corners.
 */
final class ExactClassicalBounds {

    static final MathContext DIGITS = new MathContext(60, RoundingMode.HALF_EVEN);

    private final BigDecimal[][] rows;

    ExactClassicalBounds(double[][] rows) {
        this.rows = new BigDecimal[rows.length][];
        for (int x = 0; x < rows.length; x++) {
            this.rows[x] = exact(rows[x]);
        }
    }

    static BigDecimal[] exact(double[] p) {
        BigDecimal[] e = new BigDecimal[p.length];
        for (int i = 0; i < p.length; i++) {
            e[i] = new BigDecimal(p[i]);
        }
        return e;
    }

    /** Σ_x P(x) W(y|x). */
    BigDecimal[] output(double[] input) {
        BigDecimal[] q = new BigDecimal[rows[0].length];
        for (int y = 0; y < q.length; y++) {
            q[y] = BigDecimal.ZERO;
            for (int x = 0; x < rows.length; x++) {
                q[y] = q[y].add(rows[x][y].multiply(new BigDecimal(input[x])), DIGITS);
            }
        }
        return q;
    }

    /** Σ_x P(x) Σ_y min(W(y|x), (M−1) Q(y)). */
    BigDecimal dependenceTesting(double[] input, BigDecimal others) {
        BigDecimal[] q = output(input);
        BigDecimal sum = BigDecimal.ZERO;
        for (int x = 0; x < rows.length; x++) {
            BigDecimal row = BigDecimal.ZERO;
            for (int y = 0; y < q.length; y++) {
                row = row.add(rows[x][y].min(q[y].multiply(others)), DIGITS);
            }
            sum = sum.add(row.multiply(new BigDecimal(input[x])), DIGITS);
        }
        return sum;
    }

    /** The crossing of that with ε: both ends of a bracket 1e-25 wide. */
    BigDecimal[] othersAt(double[] input, double epsilon) {
        BigDecimal level = new BigDecimal(epsilon);
        BigDecimal low = BigDecimal.ZERO;
        BigDecimal high = BigDecimal.ONE;
        while (dependenceTesting(input, high).compareTo(level) <= 0) {
            high = high.add(high);
        }
        while (high.subtract(low).compareTo(new BigDecimal("1e-25").multiply(high)) > 0) {
            BigDecimal middle = low.add(high).multiply(new BigDecimal("0.5"), DIGITS);
            if (dependenceTesting(input, middle).compareTo(level) <= 0) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return new BigDecimal[] {low, high};
    }

    /** min_x Σ_y min(t W(y|x), σ(y)) − tε. */
    private BigDecimal dual(BigDecimal[] sigma, BigDecimal epsilon, BigDecimal t) {
        BigDecimal least = null;
        for (BigDecimal[] row : rows) {
            BigDecimal f = BigDecimal.ZERO;
            for (int y = 0; y < row.length; y++) {
                f = f.add(row[y].multiply(t, DIGITS).min(sigma[y]), DIGITS);
            }
            least = least == null ? f : least.min(f);
        }
        return least.subtract(epsilon.multiply(t), DIGITS);
    }

    /**
     * sup over t of that: each letter's curve is linear between the corners t = σ(y)/W(y|x), so the maximum of the least of them is at a corner or where two
     * letters' lines cross between two neighbouring corners.
     */
    BigDecimal converse(double[] outputState, double epsilon) {
        BigDecimal[] sigma = exact(outputState);
        BigDecimal e = new BigDecimal(epsilon);
        List<BigDecimal> corners = new ArrayList<>();
        corners.add(BigDecimal.ZERO);
        for (BigDecimal[] row : rows) {
            for (int y = 0; y < row.length; y++) {
                if (row[y].signum() > 0) {
                    corners.add(sigma[y].divide(row[y], DIGITS));
                }
            }
        }
        corners.sort(Comparator.naturalOrder());
        BigDecimal best = BigDecimal.ZERO;
        for (int i = 0; i < corners.size(); i++) {
            BigDecimal t = corners.get(i);
            best = best.max(dual(sigma, e, t));
            if (i + 1 < corners.size() && corners.get(i + 1).compareTo(t) > 0) {
                for (BigDecimal crossing : crossings(sigma, t, corners.get(i + 1))) {
                    best = best.max(dual(sigma, e, crossing));
                }
            }
        }
        return best;
    }

    private List<BigDecimal> crossings(BigDecimal[] sigma, BigDecimal from, BigDecimal to) {
        List<BigDecimal> found = new ArrayList<>();
        BigDecimal length = to.subtract(from);
        for (int x = 0; x < rows.length; x++) {
            for (int z = 0; z < x; z++) {
                BigDecimal atFrom = curve(rows[x], sigma, from).subtract(curve(rows[z], sigma, from));
                BigDecimal atTo = curve(rows[x], sigma, to).subtract(curve(rows[z], sigma, to));
                if (atFrom.signum() * atTo.signum() < 0) {
                    BigDecimal part = atFrom.divide(atFrom.subtract(atTo), DIGITS);
                    found.add(from.add(part.multiply(length, DIGITS)));
                }
            }
        }
        return found;
    }

    private static BigDecimal curve(BigDecimal[] row, BigDecimal[] sigma, BigDecimal t) {
        BigDecimal f = BigDecimal.ZERO;
        for (int y = 0; y < row.length; y++) {
            f = f.add(row[y].multiply(t, DIGITS).min(sigma[y]), DIGITS);
        }
        return f;
    }
}
