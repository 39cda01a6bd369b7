package org.minorant.bounds;

import java.util.Arrays;
import java.util.Optional;
import java.util.function.Supplier;
import java.util.stream.IntStream;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.WideDouble;

/** A classical channel: all traces are sums over outcomes, and the best output state of every order is Sibson's, in closed form. */
final class DiagonalRenyi implements RenyiOutputs {

    private final double[][] rows;
    private final Supplier<RenyiOutputs> matrices;
    /** ln W(y|x) of the normalised rows. */
    private final Enclosure[][] ln;

    /**
     * Takes over the rows.
     *
     * @param rows one row for each letter
     * @param matrices the same as matrices, for states that are not diagonal
     */
    DiagonalRenyi(double[][] rows, Supplier<RenyiOutputs> matrices) {
        this.rows = rows;
        this.matrices = matrices;
        this.ln = new Enclosure[rows.length][];
        for (int x = 0; x < rows.length; x++) {
            Enclosure trace = Traces.sum(rows[x]).ln();
            double[] row = rows[x];
            ln[x] = IntStream.range(0, row.length)
                    .mapToObj(y -> Enclosure.exact(row[y]).ln().minus(trace))
                    .toArray(Enclosure[]::new);
        }
    }

    /** The optimal states have a closed form. */
    @Override
    public boolean isWellConditioned() {
        return true;
    }

    @Override
    public int letters() {
        return rows.length;
    }

    @Override
    public LettersAgainst against(DensityOperator sigma) {
        if (!DiagonalOutputs.isDiagonal(sigma)) {
            return matrices.get().against(sigma);
        }
        double[] s = new double[sigma.dimension()];
        Arrays.setAll(s, y -> Math.max(0, sigma.re(y, y)));
        return against(s);
    }

    @Override
    public LettersAgainst againstLetter(int x) {
        return new Rows(ln[x]);
    }

    @Override
    public Enclosure zeroOrder(double[] p) {
        Enclosure most = Enclosure.ZERO;
        for (int y = 0; y < rows[0].length; y++) {
            Enclosure sum = Enclosure.ZERO;
            for (int x = 0; x < p.length; x++) {
                sum = rows[x][y] > 0 ? sum.plus(Enclosure.exact(p[x])) : sum;
            }
            most = most.max(sum);
        }
        return most.dividedBy(Traces.sum(p)).ln().negate().max(Enclosure.ZERO);
    }

    private LettersAgainst against(double[] s) {
        Enclosure trace = Traces.sum(s).ln();
        Enclosure[] lnS = new Enclosure[s.length];
        Arrays.setAll(lnS, y -> Enclosure.exact(s[y]).ln().minus(trace));
        return new Rows(lnS);
    }

    @Override
    public LettersAgainst againstMixture(double[] p) {
        Enclosure sum = Traces.sum(p).ln();
        Enclosure[] lnS = new Enclosure[rows[0].length];
        for (int y = 0; y < lnS.length; y++) {
            Enclosure s = Enclosure.ZERO;
            for (int x = 0; x < p.length; x++) {
                if (p[x] > 0 && rows[x][y] > 0) {
                    s = s.plus(ln[x][y].exp().times(p[x]));
                }
            }
            lnS[y] = s.ln().minus(sum);
        }
        return new Rows(lnS);
    }

    /** ln Σ_x P(x) W(y|x)^α for each outcome, in double; −∞ for one that does not occur. */
    private double[] lnSums(double alpha, double[] p) {
        double[] lnA = new double[rows[0].length];
        for (int y = 0; y < lnA.length; y++) {
            double a = 0;
            for (int x = 0; x < p.length; x++) {
                a += p[x] * Math.exp(alpha * Math.log(rows[x][y]));
            }
            lnA[y] = Math.log(a);
        }
        return lnA;
    }

    /** The state of weights e^l. */
    private static double[] normalised(double[] l) {
        double most = Arrays.stream(l).max().orElse(0);
        return InteriorSearch.normalised(
                Arrays.stream(l).map(v -> Math.exp(v - most)).toArray());
    }

    private double[] optimum(double alpha, double[] p) {
        return normalised(Arrays.stream(lnSums(alpha, p)).map(v -> v / alpha).toArray());
    }

    /** Supports are certain here. */
    @Override
    public LettersAgainst againstFlooredMixture(double[] p) {
        return againstMixture(p);
    }

    @Override
    public LettersAgainst againstOptimum(double s, double[] p) {
        return against(optimum(1 / (1 + s), p));
    }

    @Override
    public double[] traces(double s, double[] p) {
        double alpha = 1 / (1 + s);
        return traces(alpha, optimum(alpha, p), 1 - alpha);
    }

    private double[] traces(double alpha, double[] sigma, double power) {
        double[] q = new double[rows.length];
        for (int x = 0; x < q.length; x++) {
            for (int y = 0; y < sigma.length; y++) {
                if (rows[x][y] > 0 && sigma[y] > 0) {
                    q[x] += Math.exp(alpha * Math.log(rows[x][y]) + power * Math.log(sigma[y]));
                }
            }
        }
        return q;
    }

    /** Σ_y (Σ_x P(x) W(y|x)^α)^(1/α) for the normalised input and rows. */
    private Enclosure sibson(Enclosure alpha, Enclosure inverse, double[] p) {
        Enclosure sum = Enclosure.ZERO;
        for (int y = 0; y < rows[0].length; y++) {
            Enclosure a = Enclosure.ZERO;
            for (int x = 0; x < p.length; x++) {
                if (p[x] > 0 && rows[x][y] > 0) {
                    a = a.plus(ln[x][y].times(alpha).exp().times(p[x]));
                }
            }
            if (a.upperWide().signum() > 0) {
                sum = sum.plus(a.ln().times(inverse).exp());
            }
        }
        return sum.ln().minus(Traces.sum(p).ln().times(inverse));
    }

    @Override
    public Enclosure gallager(double s, double[] p) {
        Enclosure inverse = Enclosure.ONE.plus(Enclosure.exact(s));
        return sibson(Enclosure.ONE.dividedBy(inverse), inverse, p).negate().max(Enclosure.ZERO);
    }

    @Override
    public Sandwich sandwich(double u, double[] p, Optional<Operator> near) {
        double alpha = 1 / (1 - u);
        double[] sigma = optimum(alpha, p);
        Enclosure inverse = Enclosure.exact(u).complement();
        double[] q = traces(alpha, sigma, 1 - alpha);
        double mean = 0;
        for (int x = 0; x < q.length; x++) {
            mean += p[x] * q[x];
        }
        return new Sandwich(
                Optional.empty(),
                against(sigma),
                q,
                0,
                (1 - u) * Math.log(mean),
                new Lazy<>(() -> sibson(Enclosure.ONE.dividedBy(inverse), inverse, p)));
    }

    /** The rows against the logarithms of a row of probabilities. */
    private final class Rows implements LettersAgainst {

        private final Enclosure[] lnS;

        Rows(Enclosure[] lnS) {
            this.lnS = lnS;
        }

        private boolean meets(int x, int y) {
            return rows[x][y] > 0 && lnS[y].upperWide().compareTo(WideDouble.NEGATIVE_INFINITY) > 0;
        }

        @Override
        public Enclosure psi(int x, double u) {
            Enclosure sum = Enclosure.ZERO;
            for (int y = 0; y < lnS.length; y++) {
                sum = meets(x, y) ? sum.plus(term(x, y, u)) : sum;
            }
            return sum.ln();
        }

        private Enclosure term(int x, int y, double u) {
            return ln[x][y].times(Enclosure.exact(u).complement())
                    .plus(lnS[y].times(u))
                    .exp();
        }

        @Override
        public Optional<Tangent> tangent(int x, double u) {
            Enclosure sum = Enclosure.ZERO;
            Enclosure first = Enclosure.ZERO;
            for (int y = 0; y < lnS.length; y++) {
                if (meets(x, y)) {
                    Enclosure t = term(x, y, u);
                    sum = sum.plus(t);
                    first = first.plus(t.times(lnS[y].minus(ln[x][y])));
                }
            }
            return sum.lowerWide().signum() > 0
                    ? Optional.of(new Tangent(sum.ln(), first.dividedBy(sum)))
                    : Optional.empty();
        }

        @Override
        public Enclosure norm(int x, double u) {
            Enclosure most = Enclosure.exact(Double.NEGATIVE_INFINITY);
            Enclosure inverse = Enclosure.exact(u).complement();
            for (int y = 0; y < lnS.length; y++) {
                if (rows[x][y] > 0) {
                    if (!meets(x, y)) {
                        return Enclosure.infinite();
                    }
                    most = most.max(exponent(x, y, u));
                }
            }
            if (u == 1) {
                return most.max(Enclosure.ZERO);
            }
            Enclosure sum = Enclosure.ZERO;
            for (int y = 0; y < lnS.length; y++) {
                if (rows[x][y] > 0) {
                    sum = sum.plus(
                            exponent(x, y, u).minus(most).dividedBy(inverse).exp());
                }
            }
            return most.plus(sum.ln().times(inverse)).max(Enclosure.ZERO);
        }

        /** ln W − u ln σ. */
        private Enclosure exponent(int x, int y, double u) {
            return ln[x][y].minus(lnS[y].times(u));
        }

        @Override
        public Enclosure reversed(int x) {
            Enclosure sum = Enclosure.ZERO;
            for (int y = 0; y < lnS.length; y++) {
                if (lnS[y].upperWide().compareTo(WideDouble.NEGATIVE_INFINITY) > 0) {
                    if (rows[x][y] == 0) {
                        return Enclosure.infinite();
                    }
                    sum = sum.plus(lnS[y].exp().times(lnS[y].minus(ln[x][y])));
                }
            }
            return sum.max(Enclosure.ZERO);
        }
    }
}
