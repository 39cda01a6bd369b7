package org.minorant.core.pair;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * The spectral measure of B = YY* in ψ for two columns Y, in closed form: with G = Y*Y = [[p, g], [ḡ, r]] and z = Y*ψ, the eigenvalues are b₁ = (p + r + √((p − r)² + 4|g|²))/2 and b₂ = det G/b₁, and w_j =
 * |v_j*z|²/(b_j |v_j|²) for v₁ = (g, b₁ − p) or (b₁ − r, ḡ), v₂ at right angles to it.
 *
 * <p><b>Error.</b> G, det G and z are exact; what follows is in 160-digit arithmetic without cancellation except in v_j*z, which is sized up: terms of size s with a sum of size a lose log₁₀(s/a) digits. A sum below
 * 10^-100 s counts as unresolved. All that is left is rounding to double-double.
 */
final class PlaneMeasure {

    private static final MathContext MC = new MathContext(160);
    private static final BigDecimal TWO = BigDecimal.valueOf(2);
    /** A sum this far below its terms is not resolved; their errors are below 10^-150 of them. */
    private static final int RESOLVED = 100;

    private static final double EPS = DoubleDouble.EPS;

    /** A complex number. */
    private record Z(BigDecimal re, BigDecimal im) {
        static final Z ZERO = new Z(BigDecimal.ZERO, BigDecimal.ZERO);

        Z plus(Z o) {
            return new Z(re.add(o.re), im.add(o.im));
        }

        /** conj(this) · o. */
        Z conjugateTimes(Z o) {
            return new Z(
                    re.multiply(o.re).add(im.multiply(o.im)), re.multiply(o.im).subtract(im.multiply(o.re)));
        }

        Z negatedConjugate() {
            return new Z(re.negate(), im);
        }

        Z conjugate() {
            return new Z(re, im.negate());
        }

        Z rounded() {
            return new Z(re.round(MC), im.round(MC));
        }

        BigDecimal square() {
            return re.multiply(re).add(im.multiply(im));
        }
    }

    private PlaneMeasure() {}

    /** The measure for ψ and the two columns of b. */
    static SpectralMeasure of(UnitFactor psi, UnitFactor b) {
        Z[] x = column(psi.columns(), 0);
        Z[] y1 = column(b.columns(), 0);
        Z[] y2 = column(b.columns(), 1);
        BigDecimal p = inner(y1, y1).re;
        BigDecimal r = inner(y2, y2).re;
        Z g = inner(y1, y2);
        Z[] z = {inner(y1, x), inner(y2, x)};
        BigDecimal total = inner(x, x).re;
        BigDecimal det = p.multiply(r).subtract(g.square());
        BigDecimal d = p.subtract(r);
        BigDecimal root =
                d.multiply(d).add(g.square().multiply(BigDecimal.valueOf(4))).sqrt(MC);
        BigDecimal b1 = p.add(r).add(root).divide(TWO, MC);
        BigDecimal b2 = b1.signum() == 0 ? BigDecimal.ZERO : det.divide(b1, MC);
        BigDecimal first = root.add(d.abs()).divide(TWO, MC);
        // of the two forms of v₁ the one without cancellation: b₁ − r = (p − r + √…)/2
        Z[] v1 = d.signum() >= 0 ? new Z[] {real(first), g.conjugate()} : new Z[] {g, real(first)};
        if (first.signum() == 0) {
            v1 = new Z[] {real(BigDecimal.ONE), Z.ZERO};
        }
        Z[] v2 = {v1[1].negatedConjugate(), v1[0].conjugate()};
        List<WideDoubleDouble> weights = new ArrayList<>();
        List<WideDoubleDouble> values = new ArrayList<>();
        BigDecimal unresolved = BigDecimal.ZERO;
        BigDecimal found = BigDecimal.ZERO;
        Z[][] v = {v1, v2};
        BigDecimal[] value = {b1, b2};
        for (int j = 0; j < 2; j++) {
            if (value[j].signum() == 0) {
                continue;
            }
            BigDecimal scale = value[j].multiply(v[j][0].square().add(v[j][1].square()), MC);
            Z one = v[j][0].conjugateTimes(z[0]).rounded();
            Z two = v[j][1].conjugateTimes(z[1]).rounded();
            BigDecimal terms = one.square().add(two.square());
            BigDecimal sum = one.plus(two).square();
            if (sum.compareTo(terms.movePointLeft(2 * RESOLVED)) > 0) {
                BigDecimal w = sum.divide(scale, MC);
                weights.add(wide(w, psi.power()));
                values.add(wide(value[j], b.power()));
                found = found.add(w, MC);
            } else if (terms.signum() > 0) {
                unresolved =
                        unresolved.add(terms.movePointLeft(2 * RESOLVED - 1).divide(scale, MC));
            }
        }
        SpectralMeasure m = SpectralMeasure.of(weights, values, 2 * EPS, 2 * EPS);
        boolean everything = b.columns().rows() == 2 && det.signum() > 0;
        // what is found is good to 10^-48 at least, and so is what is left
        BigDecimal kernel =
                everything ? BigDecimal.ZERO : total.subtract(found, MC).max(BigDecimal.ZERO);
        BigDecimal off = everything ? BigDecimal.ZERO : total.movePointLeft(45).add(unresolved);
        return new SpectralMeasure(
                m.weights(),
                m.values(),
                wide(kernel, psi.power()),
                up(off.add(kernel.movePointLeft(30)), psi.power()),
                wide(total, psi.power()),
                2 * EPS,
                m.weightError(),
                m.valueError(),
                up(unresolved, psi.power()),
                up(b1, b.power()));
    }

    private static Z real(BigDecimal v) {
        return new Z(v, BigDecimal.ZERO);
    }

    private static Z[] column(EnclosedMatrix x, int j) {
        Z[] c = new Z[x.rows()];
        for (int i = 0; i < c.length; i++) {
            c[i] = new Z(
                    new BigDecimal(x.re(i, j)).add(new BigDecimal(x.reTail(i, j))),
                    new BigDecimal(x.im(i, j)).add(new BigDecimal(x.imTail(i, j))));
        }
        return c;
    }

    private static Z inner(Z[] a, Z[] b) {
        Z s = Z.ZERO;
        for (int i = 0; i < a.length; i++) {
            s = s.plus(a[i].conjugateTimes(b[i]));
        }
        return s;
    }

    /** v · 2^power, to 2^-102. */
    private static WideDoubleDouble wide(BigDecimal v, int power) {
        if (v.signum() == 0) {
            return WideDoubleDouble.ZERO;
        }
        int e = (int) Math.floor((v.precision() - v.scale()) * 3.3219280948873626);
        BigDecimal scaled = e >= 0 ? v.divide(TWO.pow(e), MC) : v.multiply(TWO.pow(-e), MC);
        return WideDoubleDouble.of(DoubleDouble.of(scaled), (long) e + power);
    }

    /** Not below v · 2^power. */
    private static WideDouble up(BigDecimal v, int power) {
        WideDoubleDouble w = wide(v, power);
        return w.significand().hi() == 0
                ? WideDouble.ZERO
                : WideDouble.of(w.significand().hi() * (1 + 0x1p-50), w.exponent());
    }
}
