package org.minorant.core;

import java.util.Optional;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * Finds the factor of a positive operator that was given by its entries, the first that applies:
 *
 * <ul>
 *   <li>diagonal: roots of the entries, relative error only;
 *   <li>well-conditioned after scaling its diagonal to one: Cholesky in double-double, relative error only;
 *   <li>anything else: its certified spectrum, trace error about 1e-30 of the trace.
 * </ul>
 */
final class FactorOfEntries {

    /** A Cholesky factor with a larger relative error is not worth having. */
    private static final double WORTH = 1e-13;

    private FactorOfEntries() {}

    static PositiveFactor of(PositiveOperator a) {
        if (Positivity.isDiagonal(a)) {
            return diagonal(a);
        }
        return square(EnclosedMatrix.of(a), 0, 0).orElseGet(() -> spectral(a));
    }

    /** A square factor of XX*, or the given one if that would cost relative accuracy. */
    static PositiveFactor reduced(PositiveFactor f) {
        EnclosedMatrix x = f.columns();
        return square(x.times(x.adjoint()), f.relativeError(), f.traceError()).orElse(f);
    }

    /** A square factor of an operator within the given errors of an enclosed matrix, if that keeps relative accuracy. */
    static Optional<PositiveFactor> square(EnclosedMatrix a, double relativeError, double traceError) {
        ScaledCholesky c = ScaledCholesky.of(a);
        return c.relativeError() <= WORTH
                ? Optional.of(new PositiveFactor(
                        c.factor(), FactorSums.combined(relativeError, c.relativeError()), traceError))
                : Optional.empty();
    }

    private static PositiveFactor diagonal(PositiveOperator a) {
        int n = a.rows();
        int rank = 0;
        for (int i = 0; i < n; i++) {
            rank += a.re(i, i) > 0 ? 1 : 0;
        }
        EnclosedMatrix.Builder x = EnclosedMatrix.builder(n, Math.max(rank, 1));
        int j = 0;
        double error = 0;
        for (int i = 0; i < n; i++) {
            if (a.re(i, i) > 0) {
                // an even power of two apart, so that tiny entries keep their digits
                int e = Math.getExponent(a.re(i, i)) / 2;
                DoubleDouble r = DoubleDouble.of(Math.scalb(a.re(i, i), -2 * e)).sqrt();
                x.set(i, j++, Math.scalb(r.hi(), e), Math.scalb(r.lo(), e), 0, 0, 0);
                error = 0x1p-100;
            }
        }
        return new PositiveFactor(x.build(), error, 0);
    }

    /**
     * X = V₊√Λ₊. With E = A − VΛV* and V = Ũ(1+Δ)^½, the matrix P − N = ŨΛ₊Ũ* − ŨΛ₋Ũ* differs from A by at most residual + 2.1 δ‖Λ‖_F
     * in Frobenius norm; taking positive parts is a projection onto a convex cone and does not increase that distance. Going back
     * from ŨΛ₊Ũ* to XX* costs another 2.1 δ‖Λ‖_F and the rounding of X, at most 2^-98 Tr. The trace norm is √n times larger.
     */
    private static PositiveFactor spectral(PositiveOperator a) {
        double most = 0;
        for (int i = 0; i < a.rows(); i++) {
            most = Math.max(most, Math.abs(a.re(i, i)));
        }
        // squares of eigenvalues neither over- nor underflow at order one; an even power of two, so that the factor
        // follows exactly
        int k = Math.getExponent(most) / 2;
        int n = a.rows();
        double[] re = scaled(a.realParts(), -2 * k);
        double[] im = scaled(a.imaginaryParts(), -2 * k);
        PositiveFactor f = spectralAtOrderOne(EnclosedSpectrum.of(new HermitianOperator(n, re, im)));
        EnclosedMatrix x = f.columns();
        EnclosedMatrix.Builder b = EnclosedMatrix.builder(n, f.rank());
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < f.rank(); j++) {
                b.set(
                        i,
                        j,
                        Math.scalb(x.re(i, j), k),
                        Math.scalb(x.reTail(i, j), k),
                        Math.scalb(x.im(i, j), k),
                        Math.scalb(x.imTail(i, j), k),
                        0);
            }
        }
        // what either scaling loses to underflow is below 2^-1000 of the largest entry
        double error = (f.traceError() + 0x1p-900) * (1 + 0x1p-50);
        return new PositiveFactor(b.build(), 0, Math.scalb(error, 2 * k) + Double.MIN_VALUE);
    }

    private static double[] scaled(double[] a, int e) {
        for (int i = 0; i < a.length; i++) {
            a[i] = Math.scalb(a[i], e);
        }
        return a;
    }

    private static PositiveFactor spectralAtOrderOne(EnclosedSpectrum s) {
        int n = s.dimension();
        int rank = 0;
        double norm = 0;
        double trace = 0;
        for (int i = 0; i < n; i++) {
            rank += s.value(i) > 0 ? 1 : 0;
            norm += s.value(i) * s.value(i);
            trace += Math.abs(s.value(i));
        }
        norm = Math.sqrt(norm) * (1 + n * 0x1p-50);
        EnclosedMatrix.Builder x = EnclosedMatrix.builder(n, Math.max(rank, 1));
        int j = 0;
        for (int c = 0; c < n; c++) {
            if (s.value(c) > 0) {
                DoubleDouble root = new DoubleDouble(s.value(c), s.valueTail(c)).sqrt();
                for (int i = 0; i < n; i++) {
                    DoubleDouble re = root.times(
                            new DoubleDouble(s.vectors().re(i, c), s.vectors().reTail(i, c)));
                    DoubleDouble im = root.times(
                            new DoubleDouble(s.vectors().im(i, c), s.vectors().imTail(i, c)));
                    x.set(i, j, re.hi(), re.lo(), im.hi(), im.lo(), 0);
                }
                j++;
            }
        }
        double frobenius = s.residual() + 4.2 * s.defect() * norm;
        double error = Math.sqrt(n) * (frobenius + trace * n * 0x1p-98) * (1 + 0x1p-40);
        return new PositiveFactor(x.build(), 0, error);
    }
}
