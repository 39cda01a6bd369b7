package org.minorant.core.state;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * The triangular factor X of a Gaussian state in the photon number basis, unnormalised: ρ ∝ XX* with
 *
 * <pre>X_nk = √x^k √(n!/k!) h_(n−k)  (n ≥ k),   Σ h_j z^j = exp(βz − ½τz²),   (j+1) h_(j+1) = β h_j − τ h_(j−1).</pre>
 *
 * Column k is F|k⟩ of {@link GaussianKernel}. A truncation to n &lt; d keeps the first d rows, which have the first d columns only: ΠρΠ is
 * exactly the product of the truncated triangle with its adjoint. For a pure state x = 0 and one column is left.
 *
 * <p><b>Error.</b> Let Ψ = Σ X_nk |n⟩|k⟩, normalised: a purification of ρ. In exact arithmetic it is annihilated by o₁ = a + τa* − √x c* −
 * β and o₂ = c − √x a*, where a and c remove a photon from the first and the second mode. Their commutators [o_i, o_j*] form the matrix K =
 * ((1−|τ|²−x, τ√x), (τ̅√x, 1−x)), with determinant 1/v and trace at most 2, and [o₁, o₂] = 0. So K^(−½)(o₁, o₂) are two modes'
 * annihilators, whose numbers of quanta add up to 1 at least on whatever is orthogonal to Ψ: for every normalised Φ
 *
 * <pre>1 − |⟨Ψ|Φ⟩|² ≤ (‖o₁Φ‖² + ‖o₂Φ‖²) / λ_min(K) ≤ 2v (‖o₁Φ‖² + ‖o₂Φ‖²).</pre>
 *
 * Let Φ be the first D rows of the computed factor, normalised. Inside, o₂Φ vanishes and o₁Φ shows the rounding of the recurrence for h
 * only, at most 2^-98 (|β| + √D|τ|), whatever the recurrence does to errors; an error of the coefficients adds at most its relative size
 * times (|β| + 3√D). At the edge, with P(n) = Σ_k |X_nk|², the square is at most D P(D) + (|τ|² + x) D P(D−1), over Σ_(n&lt;D) P(n). So one
 * number bounds truncation, rounding and instability together.
 */
final class FockFactor {

    /** More photon numbers than this are not tried. */
    static final int MOST = 1 << 14;

    private final GaussianKernel kernel;
    private final List<WideComplex> h = new ArrayList<>();
    /** √n!. */
    private final List<WideComplex> rising = new ArrayList<>();
    /** √x^k / √k!, for the columns there are. */
    private final List<WideComplex> column = new ArrayList<>();
    /** P(n) = weight[n] · 2^exponent[n]. */
    private final List<Double> weight = new ArrayList<>();

    private final List<Long> exponent = new ArrayList<>();
    private double total;
    private long totalExponent;

    FockFactor(GaussianKernel kernel) {
        this.kernel = kernel;
        h.add(WideComplex.ONE);
        rising.add(WideComplex.ONE);
        column.add(WideComplex.ONE);
        appendWeight();
    }

    /** The number D of rows in Φ; row D is known too. */
    int rows() {
        return weight.size() - 1;
    }

    /** Adds one row. */
    void grow() {
        if (weight.size() > 0) {
            accumulate(weight.size() - 1);
        }
        int n = h.size();
        WideComplex next = kernel.beta().times(h.get(n - 1));
        if (n >= 2) {
            next = next.plus(kernel.tau().times(h.get(n - 2)).negate());
        }
        h.add(next.dividedBy(n));
        WideComplex root = WideComplex.of(DoubleDouble.of(n).sqrt());
        rising.add(rising.get(n - 1).times(root));
        if (!kernel.isPure()) {
            WideComplex step =
                    WideComplex.of(kernel.rootX().dividedBy(DoubleDouble.of(n).sqrt()));
            column.add(column.get(n - 1).times(step));
        }
        appendWeight();
    }

    private void accumulate(int n) {
        double w = weight.get(n);
        long e = exponent.get(n);
        if (w == 0) {
            return;
        }
        if (total == 0 || e > totalExponent) {
            total *= power(totalExponent - e);
            totalExponent = e;
        }
        total += w * power(e - totalExponent);
    }

    private static double power(long e) {
        return Math.scalb(1.0, (int) Math.max(-5000, Math.min(5000, e)));
    }

    /** P of the last row: positive terms, scaled by the largest. */
    private void appendWeight() {
        int n = h.size() - 1;
        long top = Long.MIN_VALUE;
        for (int k = 0; k < column.size(); k++) {
            if (!h.get(n - k).isZero()) {
                top = Math.max(top, column.get(k).exponent() + h.get(n - k).exponent());
            }
        }
        double sum = 0;
        for (int k = 0; k < column.size(); k++) {
            WideComplex a = column.get(k);
            WideComplex b = h.get(n - k);
            if (!b.isZero()) {
                sum += a.squaredMantissa() * b.squaredMantissa() * power(2 * (a.exponent() + b.exponent() - top));
            }
        }
        WideComplex r = rising.get(n);
        weight.add(sum * r.squaredMantissa());
        exponent.add(sum == 0 ? 0 : 2 * (top + r.exponent()));
    }

    /** P(n) / Σ_(n<D) P(n), to about 1e-12. */
    double probability(int n) {
        return weight.get(n) / total * power(exponent.get(n) - totalExponent);
    }

    /** A bound on √(1 − |⟨Ψ|Φ⟩|²) from the edge alone. */
    double edge() {
        int d = rows();
        double tau = modulus(kernel.tau());
        double x = kernel.rootX().hi() * kernel.rootX().hi();
        double square = d * probability(d) + (tau * tau + x) * d * probability(d - 1);
        return Math.sqrt(2 * kernel.spread() * square) * (1 + 0x1p-30);
    }

    /** A bound on √(1 − |⟨Ψ|Φ⟩|²): edge, rounding and error of the coefficients. */
    double distance() {
        double root = Math.sqrt(rows());
        double beta = modulus(kernel.beta());
        double rounding = 0x1p-98 * (beta + root * modulus(kernel.tau()));
        double coefficients = kernel.relativeError() * (beta + 3 * root);
        return (edge() + Math.sqrt(2 * kernel.spread()) * (rounding + coefficients)) * (1 + 0x1p-30);
    }

    private static double modulus(WideComplex z) {
        return Math.sqrt(z.squaredMantissa()) * power(z.exponent()) * (1 + 0x1p-40);
    }

    /** The share of column k in the first d rows, relative to all rows of Φ. */
    double columnShare(int k, int d) {
        double sum = 0;
        WideComplex c = column.get(k);
        for (int n = k; n < d; n++) {
            WideComplex b = h.get(n - k);
            WideComplex r = rising.get(n);
            if (!b.isZero()) {
                long e = 2 * (c.exponent() + b.exponent() + r.exponent()) - totalExponent;
                sum += c.squaredMantissa() * b.squaredMantissa() * r.squaredMantissa() * power(e);
            }
        }
        return sum / total;
    }

    /** How many columns the first d rows have. */
    int columns(int d) {
        return Math.min(column.size(), d);
    }

    /** X_nk; its modulus has relative error at most (2D + 10) · 2^-100. */
    WideComplex entry(int n, int k) {
        return rising.get(n).times(column.get(k)).times(h.get(n - k));
    }

    /** A power of two p with entries · 2^-p at most of order one. */
    long scale() {
        return Math.floorDiv(totalExponent, 2);
    }
}
