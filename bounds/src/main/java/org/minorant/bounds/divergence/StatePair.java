package org.minorant.bounds.divergence;

import java.util.Arrays;
import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;

/**
 * Two positive operators A = Σ a_i |u_i⟩⟨u_i|, B = Σ b_j |v_j⟩⟨v_j| by their certified spectra and the squared overlaps p_ij =
 * |⟨u_i|v_j⟩|²,
 * which are what most divergences are made of.
 */
public final class StatePair {

    private final PositiveOperator a;
    private final PositiveOperator b;
    private final SpectralState first;
    private final SpectralState second;
    private final EnclosedMatrix overlaps;
    private final Ball[][] squares;
    private final boolean same;

    private StatePair(
            PositiveOperator a,
            PositiveOperator b,
            SpectralState first,
            SpectralState second,
            EnclosedMatrix overlaps,
            Ball[][] squares,
            boolean same) {
        this.a = a;
        this.b = b;
        this.first = first;
        this.second = second;
        this.overlaps = overlaps;
        this.squares = squares;
        this.same = same;
    }

    /**
     * Decomposes two operators on the same space.
     *
     * @param a the first operator
     * @param b the second operator, of the same dimension
     * @return the pair
     */
    public static StatePair of(PositiveOperator a, PositiveOperator b) {
        return of(a, SpectralState.of(a), b, SpectralState.of(b));
    }

    /**
     * Pairs two operators on the same space of which the spectra are known.
     *
     * @param a the first operator
     * @param first its spectrum
     * @param b the second operator, of the same dimension
     * @param second its spectrum
     * @return the pair
     */
    public static StatePair of(PositiveOperator a, SpectralState first, PositiveOperator b, SpectralState second) {
        EnclosedMatrix o = first.vectors().adjoint().times(second.vectors());
        boolean disjoint = !first.rows().intersects(second.rows());
        Ball[][] p = new Ball[first.rank()][second.rank()];
        for (int i = 0; i < p.length; i++) {
            for (int j = 0; j < p[i].length; j++) {
                p[i][j] = disjoint ? Ball.ZERO : square(o, i, j);
            }
        }
        if (first.coordinates() && second.coordinates()) {
            int[] u = first.rows().stream().toArray();
            int[] v = second.rows().stream().toArray();
            for (int i = 0; i < p.length; i++) {
                for (int j = 0; j < p[i].length; j++) {
                    p[i][j] = u[i] == v[j] ? Ball.ONE : Ball.ZERO;
                }
            }
        }
        return new StatePair(a, b, first, second, o, p, isSame(a, b));
    }

    /**
     * Returns the pair in the other order.
     *
     * @return B and A
     */
    public StatePair reversed() {
        return of(b, second, a, first);
    }

    /** |midpoint|² with 2|midpoint|r + r² for the radius r of the entry, in either part. */
    private static Ball square(EnclosedMatrix o, int i, int j) {
        double r = o.radius(i, j);
        Ball re = new Ball(o.re(i, j), o.reTail(i, j), 0);
        Ball im = new Ball(o.im(i, j), o.imTail(i, j), 0);
        return re.times(re).plus(im.times(im)).widen(r * (2 * o.modulusUpper(i, j) + r) + Double.MIN_VALUE);
    }

    /** Whether both were given by the same numbers, or have one dimension only, so that they are equal without any computation. */
    private static boolean isSame(PositiveOperator a, PositiveOperator b) {
        if (a == b || a.dimension() == 1) {
            return true;
        }
        if (a.isDefinedByFactor() || b.isDefinedByFactor()) {
            return a.isDefinedByFactor() && b.isDefinedByFactor() && isSameExactFactor(a, b);
        }
        return Arrays.equals(a.realParts(), b.realParts()) && Arrays.equals(a.imaginaryParts(), b.imaginaryParts());
    }

    private static boolean isSameExactFactor(PositiveOperator a, PositiveOperator b) {
        EnclosedMatrix x = a.factor().columns();
        EnclosedMatrix y = b.factor().columns();
        double errors = a.factor().relativeError()
                + a.factor().traceError()
                + b.factor().relativeError()
                + b.factor().traceError();
        if (errors > 0 || x.columns() != y.columns()) {
            return false;
        }
        for (int i = 0; i < x.rows(); i++) {
            for (int j = 0; j < x.columns(); j++) {
                if (x.re(i, j) != y.re(i, j)
                        || x.reTail(i, j) != y.reTail(i, j)
                        || x.im(i, j) != y.im(i, j)
                        || x.imTail(i, j) != y.imTail(i, j)) {
                    return false;
                }
            }
        }
        return true;
    }

    /**
     * Returns the factor of the first operator.
     *
     * @return the columns of A
     */
    public PositiveFactor firstFactor() {
        return a.factor();
    }

    /**
     * Returns the factor of the second operator.
     *
     * @return the columns of B
     */
    public PositiveFactor secondFactor() {
        return b.factor();
    }

    /**
     * Returns the spectrum of the first operator.
     *
     * @return A
     */
    public SpectralState first() {
        return first;
    }

    /**
     * Returns the spectrum of the second operator.
     *
     * @return B
     */
    public SpectralState second() {
        return second;
    }

    /**
     * Returns the overlaps of eigenvectors.
     *
     * @return ⟨u_i|v_j⟩, at least as large as the ranks
     */
    public EnclosedMatrix overlaps() {
        return overlaps;
    }

    /**
     * Returns a squared overlap.
     *
     * @param i index of an eigenvector of A
     * @param j index of an eigenvector of B
     * @return p_ij = |⟨u_i|v_j⟩|²
     */
    public Ball square(int i, int j) {
        return squares[i][j];
    }

    /**
     * Tells whether both operators were given by the same numbers, or act on one dimension.
     *
     * @return whether they are equal, once normalised, without computation
     */
    public boolean isSame() {
        return same;
    }

    /**
     * Tells whether A and B are certainly orthogonal, AB = 0, by structure alone.
     *
     * @return whether all overlaps vanish exactly and nothing is left out
     */
    public boolean isOrthogonal() {
        boolean zero = first.restRank() == 0 && second.restRank() == 0;
        for (Ball[] row : squares) {
            for (Ball p : row) {
                zero &= p.magnitude() == 0;
            }
        }
        return zero;
    }

    /**
     * Returns the weight of an eigenvector of A outside the known support of B.
     *
     * @param i index of an eigenvector of A
     * @return 1 − Σ_j p_ij
     */
    public Ball outside(int i) {
        Ball w = Ball.ONE;
        for (Ball p : squares[i]) {
            w = w.minus(p);
        }
        return w;
    }

    /**
     * Tells whether the support of A lies in that of B.
     *
     * @return what is certain about it
     */
    public Containment containment() {
        if (same) {
            return Containment.CERTAIN;
        }
        boolean spans = first.rows().stream().allMatch(second.rows()::get);
        if (spans && second.fillsRows()) {
            return Containment.CERTAIN;
        }
        if (second.restRank() == 0) {
            for (int i = 0; i < first.rank(); i++) {
                if (outside(i).isPositive()) {
                    return Containment.REFUTED;
                }
            }
        }
        return Containment.UNDECIDED;
    }

    /**
     * Returns the sum Σ_ij x_i p_ij y_j.
     *
     * @param x one number for each eigenvector of A
     * @param y one number for each eigenvector of B
     * @return the sum
     */
    public Ball sum(List<Ball> x, List<Ball> y) {
        Ball s = Ball.ZERO;
        for (int i = 0; i < x.size(); i++) {
            Ball row = Ball.ZERO;
            for (int j = 0; j < y.size(); j++) {
                row = row.plus(squares[i][j].times(y.get(j)));
            }
            s = s.plus(x.get(i).times(row));
        }
        return s;
    }
}
