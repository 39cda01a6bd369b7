package org.minorant.bounds.divergence;

import static org.minorant.bounds.divergence.Multiprecision.ONE;
import static org.minorant.bounds.divergence.Multiprecision.ZERO;
import static org.minorant.bounds.divergence.Multiprecision.isPositive;
import static org.minorant.bounds.divergence.Multiprecision.number;
import static org.minorant.bounds.divergence.Multiprecision.power;

import java.math.BigDecimal;
import java.util.function.Function;
import org.hipparchus.dfp.Dfp;
import org.minorant.bounds.divergence.Multiprecision.Matrix;
import org.minorant.bounds.divergence.Multiprecision.Spectrum;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;

/** Divergences of two states to about fifty digits, straight from their definitions. Eigenvalues below 1e-45 count as zero. */
final class ReferencePair {

    private static final Dfp NOTHING = number(new BigDecimal("1e-45"));

    private final Spectrum a;
    private final Spectrum b;
    private final Matrix overlaps;

    ReferencePair(Matrix rho, Matrix sigma) {
        a = normalised(Multiprecision.diagonalise(rho));
        b = normalised(Multiprecision.diagonalise(sigma));
        overlaps = a.vectors().adjoint().times(b.vectors());
    }

    static ReferencePair of(DensityOperator rho, DensityOperator sigma) {
        return new ReferencePair(matrix(rho), matrix(sigma));
    }

    /** The operator that a state means: the positive part of its entries, or XX* of its factor, with the exact numbers. */
    static Matrix matrix(DensityOperator rho) {
        EnclosedMatrix x = rho.isDefinedByFactor() ? rho.factor().columns() : EnclosedMatrix.of(rho);
        Matrix m = Matrix.zero(x.rows(), x.columns());
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                m.re()[i][j] = number(x.re(i, j)).add(number(x.reTail(i, j)));
                m.im()[i][j] = number(x.im(i, j)).add(number(x.imTail(i, j)));
            }
        }
        return rho.isDefinedByFactor() ? m.times(m.adjoint()) : m;
    }

    /** ½(1 + r·σ) of exactly these doubles. */
    static Matrix bloch(double x, double y, double z) {
        Dfp half = number(0.5);
        Matrix m = Matrix.zero(2, 2);
        m.re()[0][0] = ONE.add(number(z)).multiply(half);
        m.re()[1][1] = ONE.subtract(number(z)).multiply(half);
        m.re()[0][1] = number(x).multiply(half);
        m.re()[1][0] = m.re()[0][1];
        m.im()[0][1] = number(y).multiply(half).negate();
        m.im()[1][0] = number(y).multiply(half);
        return m;
    }

    private static Spectrum normalised(Spectrum s) {
        Dfp trace = ZERO;
        Dfp[] d = new Dfp[s.values().length];
        for (int i = 0; i < d.length; i++) {
            d[i] = s.values()[i].greaterThan(NOTHING) ? s.values()[i] : ZERO;
            trace = trace.add(d[i]);
        }
        for (int i = 0; i < d.length; i++) {
            d[i] = d[i].divide(trace);
        }
        return new Spectrum(d, s.vectors());
    }

    private interface Term {
        Dfp of(Dfp x, Dfp y);
    }

    /** Σ p_ij g(a_i, b_j) over positive eigenvalues. */
    private Dfp sum(Term g) {
        Dfp s = ZERO;
        for (int i = 0; i < a.values().length; i++) {
            for (int j = 0; j < b.values().length; j++) {
                if (isPositive(a.values()[i]) && isPositive(b.values()[j])) {
                    s = s.add(overlaps.squaredModulus(i, j).multiply(g.of(a.values()[i], b.values()[j])));
                }
            }
        }
        return s;
    }

    private static Dfp ln(Dfp x) {
        return x.log();
    }

    Dfp relativeEntropy() {
        return sum((x, y) -> x.multiply(ln(x).subtract(ln(y))));
    }

    Dfp variance() {
        Dfp d = relativeEntropy();
        return sum((x, y) -> {
            Dfp z = ln(x).subtract(ln(y)).subtract(d);
            return x.multiply(z).multiply(z);
        });
    }

    /** Tr ρ^s σ^t. */
    private Dfp trace(Dfp s, Dfp t) {
        Dfp[] x = powers(a, s);
        Dfp[] y = powers(b, t);
        Dfp total = ZERO;
        for (int i = 0; i < x.length; i++) {
            for (int j = 0; j < y.length; j++) {
                total = total.add(overlaps.squaredModulus(i, j).multiply(x[i]).multiply(y[j]));
            }
        }
        return total;
    }

    private static Dfp[] powers(Spectrum s, Dfp p) {
        Dfp[] x = new Dfp[s.values().length];
        for (int i = 0; i < x.length; i++) {
            x[i] = power(s.values()[i], p);
        }
        return x;
    }

    Dfp petz(double alpha) {
        Dfp s = number(alpha);
        return ln(trace(s, ONE.subtract(s))).divide(s.subtract(ONE));
    }

    Dfp minimal() {
        return ln(sum((x, y) -> y)).negate();
    }

    /** The eigenvalues of ρ^½ σ^(−u) ρ^½. */
    private Dfp[] norms(Dfp u) {
        int n = a.values().length;
        Dfp[] x = new Dfp[n];
        Dfp[] y = new Dfp[n];
        for (int i = 0; i < n; i++) {
            x[i] = power(a.values()[i], number(0.5));
            y[i] = power(b.values()[i], u.negate());
        }
        Matrix z = overlaps.adjoint().scaled(x);
        Matrix k = z.adjoint().scaled(y).times(z);
        return Multiprecision.diagonalise(k).values();
    }

    /** N(u) = ln ‖ρ^½ σ^(−u) ρ^½‖_α with u = (α−1)/α. */
    private Dfp norm(Dfp u) {
        if (u.isZero()) {
            return ZERO;
        }
        Dfp alpha = ONE.divide(ONE.subtract(u));
        Dfp[] m = norms(u);
        Dfp most = largest(m);
        Dfp s = ZERO;
        for (Dfp x : m) {
            s = s.add(power(x.divide(most), alpha));
        }
        return ln(most).add(ln(s).divide(alpha));
    }

    private static Dfp largest(Dfp[] m) {
        Dfp most = ZERO;
        for (Dfp x : m) {
            most = most.lessThan(x) ? x : most;
        }
        return most;
    }

    Dfp sandwiched(double alpha) {
        Dfp u = ONE.subtract(ONE.divide(number(alpha)));
        return norm(u).divide(u);
    }

    Dfp maximal() {
        return ln(largest(norms(ONE)));
    }

    Dfp fidelity() {
        return norm(ONE.negate()).divide(2).exp();
    }

    Dfp chernoff() {
        return maximum(s -> ln(trace(s, ONE.subtract(s))).negate());
    }

    Dfp hoeffding(double rate) {
        Dfp end = number(1 - 0x1p-20);
        return maximum(v -> {
            Dfp s = v.multiply(end);
            Dfp t = ONE.subtract(s);
            return s.multiply(number(-rate)).subtract(ln(trace(t, s))).divide(t);
        });
    }

    Dfp strongConverse(double rate) {
        Dfp end = number(1 - 0x1p-20);
        return maximum(v -> {
            Dfp u = v.multiply(end);
            return u.multiply(number(rate)).subtract(norm(u));
        });
    }

    /**
     * The maximum over [0, 1] of a function that rises and then falls: golden section to 1e-3 if it is not at an end, then vertices of
     * parabolas. The last has its
     * points 1e-8 apart, which puts it within about 1e-15 of the place and 1e-29 of the maximum.
     */
    private static Dfp maximum(Function<Dfp, Dfp> f) {
        Dfp small = number(1e-20);
        Dfp first = f.apply(ZERO);
        if (!f.apply(small).greaterThan(first)) {
            return first;
        }
        Dfp last = f.apply(ONE);
        if (!f.apply(ONE.subtract(small)).greaterThan(last)) {
            return last;
        }
        double low = 0;
        double high = 1;
        double g = 0.5 * (Math.sqrt(5) - 1);
        double x = high - g * (high - low);
        double y = low + g * (high - low);
        Dfp fx = f.apply(number(x));
        Dfp fy = f.apply(number(y));
        for (int i = 0; i < 14; i++) {
            if (!fx.lessThan(fy)) {
                high = y;
                y = x;
                fy = fx;
                x = high - g * (high - low);
                fx = f.apply(number(x));
            } else {
                low = x;
                x = y;
                fx = fy;
                y = low + g * (high - low);
                fy = f.apply(number(y));
            }
        }
        Dfp u = number(0.5 * (low + high));
        for (double h : new double[] {1e-4, 1e-6, 1e-8}) {
            Dfp step = number(h);
            Dfp middle = f.apply(u);
            Dfp left = f.apply(u.subtract(step)).subtract(middle);
            Dfp right = f.apply(u.add(step)).subtract(middle);
            Dfp shift =
                    step.multiply(left.subtract(right)).divide(left.add(right).multiply(number(2)));
            u = u.add(shift);
        }
        return f.apply(u);
    }
}
