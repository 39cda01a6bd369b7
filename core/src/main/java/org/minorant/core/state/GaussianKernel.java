package org.minorant.core.state;

import org.minorant.core.Complex;
import org.minorant.core.internal.number.DoubleDouble;

/**
 * The coefficients of a Gaussian state of one mode, ρ = D(α) S(ξ) τ_m S(ξ)* D(α)*, in the normally ordered form
 *
 * <pre>ρ ∝ F F*,  F = exp(β a* − ½ τ a*²) √x^(a*a),</pre>
 *
 * where a* creates a photon. From the moments of the Husimi function, with s = m + ½, c = cosh 2r, r = |ξ| and v = m² + m + ½ + s c:
 *
 * <pre>x = m(m+1)/v,   τ = (ξ/r) s sinh 2r / v,   1 − x = (s c + ½)/v,   β = (1 − x) α + τ α̅.</pre>
 *
 * Everything is written with t = tanh r after multiplication by u = 1 − t², so that all terms are positive: c u = 1 + t², u sinh 2r = 2t.
 *
 * <p>Source: derived here; K. E. Cahill and R. J. Glauber, Phys. Rev. 177, 1857 and 1882 (1969) treat the case ξ = 0 (from memory).
 *
 * @param rootX √x
 * @param tau τ
 * @param beta β
 * @param spread v = (v u)/u, the determinant of the Husimi covariance; at least 1
 * @param relativeError a bound on the relative errors of √x, τ and β's two terms
 */
record GaussianKernel(DoubleDouble rootX, WideComplex tau, WideComplex beta, double spread, double relativeError) {

    static GaussianKernel of(Complex alpha, Complex xi, double thermalPhotons) {
        DoubleDouble one = DoubleDouble.ONE;
        DoubleDouble r2 = DoubleDouble.product(xi.re(), xi.re()).plus(DoubleDouble.product(xi.im(), xi.im()));
        DoubleDouble q = tanhRatio(r2);
        DoubleDouble t2 = r2.times(q).times(q);
        DoubleDouble u = one.minus(t2);
        DoubleDouble m = DoubleDouble.of(thermalPhotons);
        DoubleDouble s = DoubleDouble.sum(thermalPhotons, 0.5);
        DoubleDouble mm = m.times(m.plus(one));
        DoubleDouble v = mm.plus(DoubleDouble.of(0.5)).times(u).plus(s.times(one.plus(t2)));
        DoubleDouble x = mm.times(u).dividedBy(v);
        DoubleDouble rest = s.times(one.plus(t2)).plus(u.times(0.5)).dividedBy(v);
        // tanh(r)/r is smooth at r = 0, so that no phase ξ/r is needed
        DoubleDouble scale = s.times(q).times(2).dividedBy(v);
        WideComplex tau = WideComplex.of(scale.times(xi.re()), scale.times(xi.im()));
        WideComplex a = WideComplex.of(DoubleDouble.of(alpha.re()), DoubleDouble.of(alpha.im()));
        WideComplex beta = a.times(WideComplex.of(rest)).plus(tau.times(a.conjugate()));
        double spread = v.hi() / u.hi() * (1 + 0x1p-40);
        // about 100 operations of 2^-101 each; the difference 1 − t² magnifies by at most 1/u
        return new GaussianKernel(x.sqrt(), tau, beta, spread, 0x1p-92 / u.hi());
    }

    /** tanh(r)/r = 1/(1 + r²/(3 + r²/(5 + …))): positive terms only. The depth makes the rest smaller than 2^-110 for r ≤ 4. */
    private static DoubleDouble tanhRatio(DoubleDouble r2) {
        int depth = 40;
        DoubleDouble f = DoubleDouble.of(2.0 * depth + 1);
        for (int k = depth; k >= 1; k--) {
            f = DoubleDouble.of(2.0 * k - 1).plus(r2.dividedBy(f));
        }
        return DoubleDouble.ONE.dividedBy(f);
    }

    boolean isPure() {
        return rootX.hi() == 0;
    }
}
