package org.minorant.core.state;

import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Truncates the triangle of {@link FockFactor} and bounds what that costs.
 *
 * <p><b>Argument.</b> Let e bound √(1 − |⟨Ψ|Φ⟩|²) for D rows, D beyond the dimension d kept, and ŵ be the weight of the rows from d in Φ.
 * With the phase chosen well, ‖Ψ − Φ‖ ≤ √2 e, so the ideal weight w obeys |√w − √ŵ| ≤ √2 e. Cutting and normalising moves Φ by √ŵ in trace
 * distance (its overlap is 1 − ŵ), and going to Ψ costs e more; leaving out columns of total share q costs q; rounding the entries, each
 * relative to itself, at most D · 2^-97. Trace distances do not grow when the second mode is traced out.
 */
final class GaussianLight {

    /** The edge is pushed out until it is this much smaller than what is cut off. */
    private static final double EDGE = 0x1p-60;

    /** An edge this small is small enough whatever is cut off. */
    private static final double LEAST_EDGE = 1e-54;

    /** Columns whose share of all is this much below the weight cut off are left out. */
    private static final double NEGLIGIBLE = 0x1p-40;

    private GaussianLight() {}

    static TruncatedState of(String asked, GaussianKernel kernel, Truncation truncation) {
        FockFactor x = new FockFactor(kernel);
        int d = truncation.isOfDimension()
                ? toDimension(asked, x, truncation.dimension())
                : toTail(asked, x, truncation);
        LightLimits.checkMemory(asked, d);
        double e = x.distance();
        double cut = tail(x, d);
        double root = Math.sqrt(cut);
        double upper = square(root + Math.sqrt(2) * e) * (1 + 0x1p-30);
        double lower = square(Math.max(0, root - Math.sqrt(2) * e)) * (1 - 0x1p-30);
        LightLimits.checkWeight(asked, d, upper);
        int columns = x.columns(d);
        double left = 0;
        while (columns > 1) {
            double share = x.columnShare(columns - 1, d);
            if (left + share > NEGLIGIBLE * cut) {
                break;
            }
            left += share;
            columns--;
        }
        // shares are of all rows; the rows kept hold at least half
        double distance = (Math.sqrt(cut) + e + 2 * left + x.rows() * 0x1p-97) * (1 + 0x1p-30);
        return new TruncatedState(
                state(x, d, columns), Enclosure.of(Math.min(lower, 1), Math.min(upper, 1)), Math.min(distance, 1));
    }

    private static double square(double v) {
        return v * v;
    }

    /** The weight of the rows from d on in Φ. */
    private static double tail(FockFactor x, int d) {
        double sum = 0;
        for (int n = x.rows() - 1; n >= d; n--) {
            sum += x.probability(n);
        }
        return sum;
    }

    private static int toDimension(String asked, FockFactor x, int d) {
        double beyond = 0;
        do {
            grow(asked, x);
            beyond = x.rows() > d ? tail(x, d) : 0;
        } while (x.rows() <= d || square(x.edge()) > Math.max(EDGE * beyond, LEAST_EDGE));
        return d;
    }

    private static int toTail(String asked, FockFactor x, Truncation truncation) {
        do {
            grow(asked, x);
        } while (square(x.edge()) > EDGE * truncation.tail());
        double shift = Math.sqrt(2) * x.distance();
        double sum = 0;
        int d = x.rows();
        while (d > 1) {
            double next = sum + x.probability(d - 1);
            if (square(Math.sqrt(next) + shift) * (1 + 0x1p-29) > truncation.tail()) {
                break;
            }
            sum = next;
            d--;
        }
        return d;
    }

    private static void grow(String asked, FockFactor x) {
        if (x.rows() >= FockFactor.MOST) {
            throw new InvalidInputException(
                    asked,
                    "the state has weight beyond " + FockFactor.MOST + " photon numbers",
                    "a state whose tail can be bounded there",
                    "lower the energy or the squeezing");
        }
        x.grow();
    }

    /** XX* of the first d rows and columns kept, normalised. */
    private static DensityOperator state(FockFactor x, int d, int columns) {
        DoubleDouble[][] re = new DoubleDouble[d][columns];
        DoubleDouble[][] im = new DoubleDouble[d][columns];
        DoubleDouble sum = DoubleDouble.ZERO;
        long shift = -x.scale();
        for (int n = 0; n < d; n++) {
            for (int k = 0; k < columns; k++) {
                WideComplex z = k <= n ? x.entry(n, k) : WideComplex.ZERO;
                re[n][k] = z.re(shift);
                im[n][k] = z.im(shift);
                sum = sum.plus(re[n][k].times(re[n][k])).plus(im[n][k].times(im[n][k]));
            }
        }
        DoubleDouble norm = sum.sqrt();
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(d, columns);
        for (int n = 0; n < d; n++) {
            for (int k = 0; k < columns; k++) {
                DoubleDouble p = re[n][k].dividedBy(norm);
                DoubleDouble q = im[n][k].dividedBy(norm);
                b.set(n, k, p.hi(), p.lo(), q.hi(), q.lo(), 0);
            }
        }
        return DensityOperator.of(PositiveOperator.ofFactor(new PositiveFactor(b.build(), 0, 0)));
    }
}
