package org.minorant.core.pair;

import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Columns X of A and Y of B with their inner products. The products are what defines the pair for the certificate; the columns themselves only guide the rotations.
 *
 * @param x columns of A
 * @param y columns of B
 * @param gx X*X
 * @param gy Y*Y
 * @param cross X*Y
 */
record ColumnPair(EnclosedMatrix x, EnclosedMatrix y, EnclosedMatrix gx, EnclosedMatrix gy, EnclosedMatrix cross) {

    /** Inner products across that lost more than this to cancellation are computed exactly. */
    private static final double CANCELLED = 0x1p-70;

    private static final long EXACT_PRODUCTS = 2_000_000;

    /** An exact change of columns costs about 10 microseconds for each unit of dimension · columns². */
    private static final long EXACT_CHANGE = 60_000;

    /** The pair of these columns, taken as exact. */
    static ColumnPair of(EnclosedMatrix x, EnclosedMatrix y) {
        return new ColumnPair(x, y, x.adjoint().times(x), y.adjoint().times(y), crossProducts(x, y));
    }

    /** X*Y; entries that cancel are summed exactly, so that nearly orthogonal columns keep the digits of their overlap. */
    private static EnclosedMatrix crossProducts(EnclosedMatrix x, EnclosedMatrix y) {
        EnclosedMatrix m = x.adjoint().times(y);
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(m.rows(), m.columns());
        long budget = EXACT_PRODUCTS;
        Optional<ExactColumns> ex = Optional.empty();
        Optional<ExactColumns> ey = Optional.empty();
        for (int i = 0; i < m.rows(); i++) {
            for (int j = 0; j < m.columns(); j++) {
                double size = Math.hypot(m.re(i, j), m.im(i, j));
                if (m.radius(i, j) <= CANCELLED * size || (budget -= x.rows()) < 0) {
                    b.set(i, j, m.re(i, j), m.reTail(i, j), m.im(i, j), m.imTail(i, j), m.radius(i, j));
                } else {
                    ex = Optional.of(ex.orElseGet(() -> ExactColumns.of(x)));
                    ey = Optional.of(ey.orElseGet(() -> ExactColumns.of(y)));
                    ex.get().product(i, ey.get(), j, b);
                }
            }
        }
        return b.build();
    }

    /** Whether {@link #orthogonalised()} costs little enough. */
    boolean isSmall() {
        long columns = (long) x.columns() + y.columns();
        return x.rows() * columns * columns <= EXACT_CHANGE;
    }

    /** The pair after a change of columns, and the relative error that the change costs both operators. */
    record Changed(ColumnPair pair, double relativeError) {}

    /**
     * The pair of columns XV and YW with V, W unitary to about 1e-30 and nearly diagonalising X*X and Y*Y. The products are evaluated exactly and rounded once, so that weak
     * combinations of strong columns keep their digits, which X*X in 32 digits has lost.
     */
    Changed orthogonalised() {
        EnclosedSpectrum sx = EnclosedSpectrum.of(gx);
        EnclosedSpectrum sy = EnclosedSpectrum.of(gy);
        ExactColumns ex = ExactColumns.of(x).times(sx.vectors());
        ExactColumns ey = ExactColumns.of(y).times(sy.vectors());
        ColumnPair pair = new ColumnPair(ex.rounded(), ey.rounded(), ex.products(ex), ey.products(ey), ex.products(ey));
        // XVV*X* with ‖VV* − 1‖ = ‖V*V − 1‖ for square V
        return new Changed(pair, Math.max(sx.defect(), sy.defect()) * (1 + 0x1p-50));
    }

    /** Encloses Tr[wa XX* ∧ wb YY*] for weights on the scale of double. */
    Enclosure enclose(double wa, double wb) {
        return enclose(wa, wb, () -> {});
    }

    /** The same; the checkpoint is passed many times a second and may throw. */
    Enclosure enclose(double wa, double wb, Runnable checkpoint) {
        return weighted(wa, wb)
                .map(w -> RotationCertificate.enclose(w, checkpoint))
                .orElse(Enclosure.ZERO);
    }

    /** Tr[wa XX* ∧ wb YY*] as the rotations find it, without proof; an enclosure if they found it hard. */
    Enclosure estimate(double wa, double wb, Runnable checkpoint) {
        return weighted(wa, wb).map(w -> estimate(w, checkpoint)).orElse(Enclosure.ZERO);
    }

    private static Enclosure estimate(WeightedColumns w, Runnable checkpoint) {
        HyperbolicSweeps s = w.sweep(checkpoint);
        if (s.isDoubtful()) {
            return RotationCertificate.enclose(w, s, checkpoint);
        }
        WideDouble total = WideDouble.of(s.total(), 2L * w.exponent());
        return Enclosure.of(total, total);
    }

    private Optional<WeightedColumns> weighted(double wa, double wb) {
        DoubleDouble sa = DoubleDouble.of(wa).sqrt();
        DoubleDouble sb = DoubleDouble.of(wb).sqrt();
        EnclosedMatrix wx = scale(x, sa).midpoint();
        EnclosedMatrix wy = scale(y, sb).midpoint();
        return new WeightedColumns(
                        () -> wx,
                        () -> wy,
                        scale(scale(gx, sa), sa),
                        scale(scale(gy, sb), sb),
                        scale(scale(cross, sa), sb),
                        0)
                .rescaled();
    }

    private static EnclosedMatrix scale(EnclosedMatrix m, DoubleDouble s) {
        return s.lo() == 0 ? m.times(s.hi()) : m.times(s.hi()).plus(m.times(s.lo()));
    }
}
