package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The spectral measure of B = YY* in ψ to about 30 digits, relative ones where the Gram matrix Y*Y is not too ill-conditioned.
 *
 * <p>Two columns have a closed form, whatever their condition: {@link PlaneMeasure}.
 *
 * <p><b>Argument.</b> Let V be a nearly unitary matrix that nearly diagonalises Y*Y (any will do), D a diagonal one and E = YVD. With 1 + Δ = E*E, the columns of Ẽ = E(1 + Δ)^(−½) are
 * orthonormal exactly, and B̃ = ẼD⁻²Ẽ* has the eigenvalues D_j⁻² exactly. B̃ is within a relative error of B in the Loewner order: YVV*Y* is within δ = ‖V*V − 1‖ of B, and D⁻¹(1 + Δ)^½ = (1 + Ξ)D⁻¹ with
 * ‖Ξ‖ ≤ ‖Δ‖ = ξ, so that ED⁻²E* and B̃ differ relatively by at most 2ξ√κ + ξ²κ, κ the ratio of the largest to the smallest D_j⁻². The amplitudes Ẽ*ψ differ from E*ψ by at most ξ‖E*ψ‖.
 *
 * @param spectral the measure of B̃
 * @param relativeError of B̃ against B
 */
record FactorMeasure(SpectralMeasure spectral, double relativeError) {

    /** A factor worse than this is not worth having. */
    private static final double WORTH = 1e-15;

    /** Amplitudes with a larger relative error are left out as unresolved. */
    private static final double RESOLVED = 1e-18;

    private static final double EPS = DoubleDouble.EPS;

    /** The measure for ψ and Y, the columns of exact numbers near one in size. */
    static Optional<FactorMeasure> of(UnitFactor psi, UnitFactor b) {
        EnclosedMatrix y = b.columns();
        int r = y.columns();
        if (r == 2) {
            return Optional.of(new FactorMeasure(PlaneMeasure.of(psi, b), 0));
        }
        EnclosedMatrix v = EnclosedMatrix.identity(1);
        double defect = 0;
        DoubleDouble[] values = new DoubleDouble[r];
        if (r == 1) {
            values[0] = squaredNorm(y);
        } else {
            EnclosedSpectrum s = EnclosedSpectrum.of(y.adjoint().times(y));
            v = s.vectors();
            defect = s.defect();
            for (int j = 0; j < r; j++) {
                values[j] = new DoubleDouble(s.value(j), s.valueTail(j));
            }
        }
        double largest = 0;
        double smallest = Double.POSITIVE_INFINITY;
        for (DoubleDouble x : values) {
            largest = Math.max(largest, x.hi());
            smallest = Math.min(smallest, x.hi());
        }
        if (!(smallest > 1e-28 * largest)) {
            return Optional.empty();
        }
        EnclosedMatrix.Builder d = EnclosedMatrix.builder(r, r);
        List<WideDoubleDouble> exact = new ArrayList<>();
        for (int j = 0; j < r; j++) {
            DoubleDouble x = DoubleDouble.ONE.dividedBy(values[j].sqrt());
            d.set(j, j, x.hi(), x.lo(), 0, 0, 0);
            exact.add(WideDoubleDouble.of(DoubleDouble.ONE.dividedBy(x.times(x)), b.power()));
        }
        EnclosedMatrix e = y.times(v).times(d.build());
        double xi = e.adjoint().times(e).minus(EnclosedMatrix.identity(r)).frobeniusUpper();
        double root = xi * Math.sqrt(largest / smallest) * (1 + 0x1p-20);
        double error = (2 * root + root * root + 2.1 * defect) * (1 + 0x1p-20);
        if (!(error <= WORTH && xi < 0.01)) {
            return Optional.empty();
        }
        return Optional.of(new FactorMeasure(measure(psi, e, xi, exact), error));
    }

    private static SpectralMeasure measure(UnitFactor psi, EnclosedMatrix e, double xi, List<WideDoubleDouble> exact) {
        EnclosedMatrix c = e.adjoint().times(psi.columns());
        DoubleDouble total = squaredNorm(psi.columns());
        double turned = 1.1 * xi * Math.sqrt(total.hi());
        List<WideDoubleDouble> weights = new ArrayList<>();
        List<WideDoubleDouble> values = new ArrayList<>();
        double weightError = 0;
        double absolute = 0;
        double unresolved = 0;
        DoubleDouble found = DoubleDouble.ZERO;
        for (int j = 0; j < c.rows(); j++) {
            WideDoubleDouble w = SpectralMeasure.squaredModulus(c, j, 0);
            double radius = (2 * c.radius(j, 0) + turned) * (1 + 0x1p-20);
            double size = Math.hypot(c.re(j, 0), c.im(j, 0));
            if (radius <= RESOLVED * size) {
                weights.add(WideDoubleDouble.of(w.significand(), w.exponent() + psi.power()));
                values.add(exact.get(j));
                weightError = Math.max(weightError, 2.01 * radius / size);
                absolute += 2.01 * radius * size;
                found = found.plus(w.toDoubleDouble(0));
            } else {
                unresolved += (size + radius) * (size + radius) * (1 + 0x1p-20);
            }
        }
        // exactly zero where neither the vector nor the rounding can reach it
        WideDouble dust = WideDouble.of(unresolved).timesPowerOfTwo(psi.power());
        WideDoubleDouble kernel = WideDoubleDouble.ZERO;
        WideDouble kernelError = WideDouble.ZERO;
        if (e.columns() < e.rows()) {
            DoubleDouble k = total.minus(found);
            kernel = k.hi() > 0 ? WideDoubleDouble.of(k, psi.power()) : WideDoubleDouble.ZERO;
            double off = Math.max(0, -k.hi()) + absolute + unresolved + 64 * e.rows() * EPS * total.hi();
            kernelError = WideDouble.of(off * (1 + 0x1p-20)).timesPowerOfTwo(psi.power());
        }
        SpectralMeasure m = SpectralMeasure.of(weights, values, weightError + 8 * EPS, 16 * EPS);
        return new SpectralMeasure(
                m.weights(),
                m.values(),
                kernel,
                kernelError,
                WideDoubleDouble.of(total, psi.power()),
                64 * e.rows() * EPS,
                m.weightError(),
                m.valueError(),
                dust,
                WideDouble.of(
                        exact.get(exact.size() - 1).significand().hi(),
                        exact.get(exact.size() - 1).exponent() + 1));
    }

    /** Σ |x|² of a column, to 8 · rows · 2^-102 for entries near one. */
    private static DoubleDouble squaredNorm(EnclosedMatrix x) {
        WideDoubleDouble s = WideDoubleDouble.ZERO;
        for (int i = 0; i < x.rows(); i++) {
            s = Letters.sum(s, SpectralMeasure.squaredModulus(x, i, 0));
        }
        return s.toDoubleDouble(0);
    }
}
