package org.minorant.bounds;

import java.util.AbstractList;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.PositiveOperator;
import org.minorant.core.pair.PositivePair;

/** Outputs diagonal in the given basis: a classical channel, its rows the eigenvalues. Everything is a sum over outcomes. */
final class DiagonalOutputs implements ChannelOutputs {

    /** Products below this may have lost digits to gradual underflow. */
    private static final double SHALLOW = 0x1p-960;

    private final double[][] rows;
    private final Enclosure traces;

    /** Takes over validated rows. */
    DiagonalOutputs(double[][] rows) {
        this.rows = rows;
        Enclosure hull = Traces.sum(rows[0]);
        for (double[] row : rows) {
            hull = hull.hull(Traces.sum(row));
        }
        this.traces = hull;
    }

    static DiagonalOutputs of(List<DensityOperator> outputs) {
        return new DiagonalOutputs(
                outputs.stream().map(DiagonalOutputs::diagonal).toArray(double[][]::new));
    }

    /** The output states, each made when it is asked for. */
    List<DensityOperator> states() {
        return new AbstractList<>() {
            @Override
            public DensityOperator get(int x) {
                return DensityOperator.ofEigenvalues(rows[x]);
            }

            @Override
            public int size() {
                return rows.length;
            }
        };
    }

    /** Whether an operator is defined by its entries and these are diagonal. */
    static boolean isDiagonal(PositiveOperator a) {
        if (a.isDefinedByFactor()) {
            return false;
        }
        for (int i = 0; i < a.dimension(); i++) {
            for (int j = 0; j < i; j++) {
                if (a.re(i, j) != 0 || a.im(i, j) != 0) {
                    return false;
                }
            }
        }
        return true;
    }

    /** The eigenvalues meant: the positive part of the entries. */
    private static double[] diagonal(PositiveOperator a) {
        double[] d = new double[a.dimension()];
        Arrays.setAll(d, i -> Math.max(0, a.re(i, i)));
        return d;
    }

    private double[] mixture(double[] q) {
        double[] s = new double[rows[0].length];
        for (int x = 0; x < rows.length; x++) {
            for (int y = 0; y < s.length; y++) {
                s[y] += q[x] * rows[x][y];
            }
        }
        return s;
    }

    @Override
    public RenyiOutputs renyi() {
        return new DiagonalRenyi(rows, () -> new MatrixRenyi(states()));
    }

    @Override
    public DensityOperator mixtureState(double[] p) {
        double[] s = mixture(p);
        double sum = 0;
        for (double v : s) {
            sum += v;
        }
        // rows and input may each miss one by a rounding, and the mixture by both
        double[] t = s.clone();
        for (int y = 0; y < s.length && Math.abs(sum - 1) > s.length * 0x1p-51; y++) {
            t[y] = s[y] / sum;
        }
        return DensityOperator.ofEigenvalues(t);
    }

    @Override
    public Slope slope(double[] p) {
        int k = rows.length;
        double[] s = mixture(p);
        double[] d = new double[k];
        double[][] curvature = new double[k][k];
        double[][] scaled = new double[k][s.length];
        for (int x = 0; x < k; x++) {
            for (int y = 0; y < s.length; y++) {
                double w = rows[x][y];
                if (w > 0) {
                    d[x] += w * Math.log(w / s[y]);
                    scaled[x][y] = w / Math.sqrt(s[y]);
                }
            }
        }
        for (int x = 0; x < k; x++) {
            for (int z = 0; z <= x; z++) {
                double c = 0;
                for (int y = 0; y < s.length; y++) {
                    c += scaled[x][y] * scaled[z][y];
                }
                curvature[x][z] = c;
                curvature[z][x] = c;
            }
        }
        return new Slope(d, curvature);
    }

    @Override
    public CapacityCertificate certify(double[] p) {
        double[] s = mixture(p);
        // σ is this array divided by its sum; the mixture is below it but for rounding, at most (letters + 2) units in
        // each entry
        Enclosure sum = Traces.sum(s);
        Enclosure lnSum = sum.ln();
        Enclosure[] ln = new Enclosure[s.length];
        Arrays.setAll(ln, y -> Enclosure.exact(s[y]).ln().minus(lnSum));
        List<Enclosure> divergences = new ArrayList<>();
        for (double[] row : rows) {
            Enclosure trace = Traces.sum(row);
            Enclosure entropy = Enclosure.ZERO;
            Enclosure cross = Enclosure.ZERO;
            for (int y = 0; y < row.length; y++) {
                if (row[y] > 0) {
                    entropy = entropy.plus(EntropyTerm.of(Enclosure.exact(row[y])));
                    cross = cross.plus(ln[y].times(row[y]));
                }
            }
            divergences.add(
                    entropy.minus(cross).dividedBy(trace).minus(trace.ln()).max(Enclosure.ZERO));
        }
        double rounding = (rows.length + 4) * 0x1p-52;
        boolean shallow = isShallow(p);
        Enclosure slack = shallow
                ? sum.dividedBy(Traces.sum(p).times(traces)).times(1 + rounding).ln()
                : Enclosure.infinite();
        return CapacityCertificate.of(p, divergences, slack);
    }

    /** Whether every product of the mixture is zero exactly or far from underflow. */
    private boolean isShallow(double[] q) {
        for (int x = 0; x < rows.length; x++) {
            for (double w : rows[x]) {
                if (q[x] > 0 && w > 0 && q[x] * w < SHALLOW) {
                    return false;
                }
            }
        }
        return true;
    }

    @Override
    public LetterCurves against(int[] letters, DensityOperator sigma) {
        List<PositivePair> pairs = new ArrayList<>();
        boolean diagonal = isDiagonal(sigma);
        double[] s = diagonal ? diagonal(sigma) : new double[0];
        for (int x : letters) {
            pairs.add(
                    diagonal
                            ? PositivePair.ofSpectra(rows[x], s)
                            : PositivePair.of(DensityOperator.ofEigenvalues(rows[x]), sigma));
        }
        return new LetterCurves(pairs, traces, Traces.of(sigma));
    }

    @Override
    public LetterCurves againstMixture(int[] letters, double[] q) {
        if (!isShallow(q)) {
            return against(letters, DensityOperator.mixture(states(), q));
        }
        double[] s = mixture(q);
        List<PositivePair> pairs = new ArrayList<>();
        for (int x : letters) {
            pairs.add(PositivePair.ofSpectra(rows[x], s));
        }
        return new LetterCurves(pairs, traces, traceOfMixture(q));
    }

    /** A sum of n positive products, each rounded, is within n + 1 roundings of the exact one. */
    private Enclosure traceOfMixture(double[] q) {
        double rounding = (rows.length + 4) * 0x1p-53;
        Enclosure relative = Enclosure.of(1 - rounding, 1 + rounding);
        return Traces.sum(q).times(traces).times(relative);
    }

    @Override
    public WordCurves words(double[] p, int n) {
        if (!isShallow(p)) {
            throw WordCurves.notCovered("products of probabilities of letters and outcomes below " + SHALLOW);
        }
        return new CommutingWords(rows, traces, n).mean(p, mixture(p));
    }

    /** The random-coding union bound of n uses. */
    RandomCodingUnion union(double[] p, int n) {
        if (!isShallow(p)) {
            throw WordCurves.notCovered("products of probabilities of letters and outcomes below " + SHALLOW);
        }
        return new RandomCodingUnion(rows, p, traces, n);
    }

    @Override
    public WordCurves wordsAgainst(DensityOperator sigma, int n) {
        if (!isDiagonal(sigma)) {
            throw WordCurves.notCovered("an output state that does not commute with the letters");
        }
        return new CommutingWords(rows, traces, n).against(diagonal(sigma), Traces.of(sigma));
    }

    @Override
    public WordCurves wordsAgainstMixture(double[] q, int n) {
        return isShallow(q)
                ? new CommutingWords(rows, traces, n).against(mixture(q), traceOfMixture(q))
                : wordsAgainst(DensityOperator.mixture(states(), q), n);
    }

    @Override
    public TypedWords typed(double[] q, int n) {
        if (!isShallow(q)) {
            throw WordCurves.notCovered("products of probabilities of letters and outcomes below " + SHALLOW);
        }
        return new CommutingWords(rows, traces, n).typed(mixture(q), traceOfMixture(q));
    }

    @Override
    public TypeCost typeCost() {
        return TypeCost.SUMS;
    }
}
