package org.minorant.tests.containment;

import static org.minorant.tests.Draw.logUniform;

import java.util.Random;
import org.minorant.tests.Draw;
import org.minorant.tests.Draw.Matrix;

/** The kinds of pairs that containment is tried on, nasty ones foremost. */
enum PairFamily {
    RANDOM_ENTRIES(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            return pair(r, GivenOperator.ofEntries(o.mixed(n)), GivenOperator.ofEntries(o.mixed(n)));
        }
    },
    RANDOM_LARGE(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(8, 16);
            return pair(r, GivenOperator.ofEntries(o.mixed(n)), GivenOperator.ofEntries(o.mixed(n)));
        }
    },
    RANDOM_FACTORS(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            return pair(
                    r,
                    GivenOperator.ofColumns(o.columns(n, o.dimension(1, n + 2))),
                    GivenOperator.ofColumns(o.columns(n, o.dimension(1, n + 2))));
        }
    },
    MIXED_FORMS(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(1, 6);
            return n == 2 ? pair(r, o.qubit(), o.qubit()) : pair(r, o.any(n), o.any(n));
        }
    },
    EQUAL(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(1, 6);
            GivenOperator a = n == 2 ? o.qubit() : o.any(n);
            return new PairCase(1, a, r.nextBoolean() ? 1 : weight(r), a);
        }
    },
    COMMUTING_DIAGONAL(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(1, 8);
            double[] p = r.nextBoolean() ? o.spectrum(n) : o.repeated(n);
            double[] q = r.nextBoolean() ? o.spectrum(n) : o.graded(n, -300);
            return pair(r, GivenOperator.ofDiagonal(p), GivenOperator.ofDiagonal(q));
        }
    },
    COMMUTING_ROTATED(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            Matrix u = Draw.unitary(r, n);
            return pair(
                    r,
                    GivenOperator.ofEntries(Draw.withSpectrum(u, o.spectrum(n))),
                    GivenOperator.ofEntries(Draw.withSpectrum(u, o.spectrum(n))));
        }
    },
    ORTHOGONAL(Promise.CONTAINMENT) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            int k = o.dimension(1, n - 1);
            double[] p = new double[n];
            double[] q = new double[n];
            for (int i = 0; i < n; i++) {
                (i < k ? p : q)[i] = r.nextDouble();
            }
            Matrix u = Draw.unitary(r, n);
            return switch (r.nextInt(4)) {
                case 0 -> pair(r, GivenOperator.ofDiagonal(p), GivenOperator.ofDiagonal(q));
                case 1 ->
                    pair(
                            r,
                            GivenOperator.ofEntries(Draw.withSpectrum(u, p)),
                            GivenOperator.ofEntries(Draw.withSpectrum(u, q)));
                case 2 -> pair(r, GivenOperator.ofColumns(roots(u, p)), GivenOperator.ofColumns(roots(u, q)));
                default ->
                    pair(r, GivenOperator.ofEntries(block(p, 0, k, o)), GivenOperator.ofEntries(block(q, k, n - k, o)));
            };
        }
    },
    RANK_ONE(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            GivenOperator ket = r.nextBoolean()
                    ? GivenOperator.ofKet(o.ket(n))
                    : GivenOperator.ofColumns(o.columns(n, 1).times(logUniform(r, -3, 3)));
            GivenOperator other = r.nextBoolean() ? GivenOperator.ofKet(o.ket(n)) : o.any(n);
            return r.nextBoolean() ? pair(r, ket, other) : pair(r, other, ket);
        }
    },
    RANK_DEFICIENT(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            int k = o.dimension(1, n - 1);
            int l = o.dimension(1, n);
            GivenOperator a = r.nextBoolean()
                    ? GivenOperator.ofEntries(o.ofRank(n, k))
                    : GivenOperator.ofColumns(o.columns(n, k));
            GivenOperator b = r.nextBoolean()
                    ? GivenOperator.ofEntries(o.ofRank(n, l))
                    : GivenOperator.ofColumns(o.columns(n, l));
            return pair(r, a, b);
        }
    },
    NEARLY_COLLINEAR(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            int k = o.dimension(1, n);
            Matrix x = o.columns(n, k);
            Matrix y = x.combine(1, o.columns(n, k), logUniform(r, -17, -4));
            if (r.nextBoolean()) {
                // nearly dependent columns within one operator, too
                x = x.combine(1, x.times(rankOneMap(r, k)), 1e6);
            }
            return pair(r, GivenOperator.ofColumns(x), GivenOperator.ofColumns(y));
        }
    },
    NEARLY_EQUAL(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            Matrix a = r.nextBoolean() ? o.mixed(n) : o.ofRank(n, o.dimension(1, n));
            double d = r.nextBoolean() ? 1e-12 : logUniform(r, -16, -6);
            GivenOperator b = GivenOperator.ofEntries(
                    a.combine(1 - d, o.mixed(n), r.nextBoolean() ? d : 0).hermitian());
            return new PairCase(1, GivenOperator.ofEntries(a), r.nextBoolean() ? 1 : 1 - 1e-12, b);
        }
    },
    REPEATED_SPECTRA(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            Matrix a = Draw.withSpectrum(Draw.unitary(r, n), o.repeated(n));
            Matrix b = r.nextInt(4) == 0
                    ? Draw.diagonal(o.repeated(n))
                    : Draw.withSpectrum(Draw.unitary(r, n), o.repeated(n));
            return new PairCase(1, GivenOperator.ofEntries(a), 0.25 * (1 + r.nextInt(8)), GivenOperator.ofEntries(b));
        }
    },
    CLUSTERED_SPECTRA(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            Matrix u = Draw.unitary(r, n);
            Matrix v = r.nextBoolean() ? u : Draw.unitary(r, n);
            return new PairCase(
                    1,
                    GivenOperator.ofEntries(Draw.withSpectrum(u, o.clustered(n))),
                    r.nextBoolean() ? 1 : weight(r),
                    GivenOperator.ofEntries(Draw.withSpectrum(v, o.clustered(n))));
        }
    },
    GRADED_FACTORS(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            return pair(r, gradedColumns(r, o, n), gradedColumns(r, o, n));
        }
    },
    GRADED_ENTRIES(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            return pair(r, gradedEntries(r, o, n), gradedEntries(r, o, n));
        }
    },
    EXTREME_PRIORS(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            double p = r.nextBoolean() ? 1e-12 : 1 - 1e-12;
            return n == 2 ? new PairCase(p, o.qubit(), 1 - p, o.qubit()) : new PairCase(p, o.any(n), 1 - p, o.any(n));
        }
    },
    EXTREME_WEIGHTS(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(1, 6);
            double[] t = {0, Double.MIN_VALUE, 1e-300, 1e-30, 1e30, 1e300, Double.MAX_VALUE};
            double b = t[r.nextInt(t.length)];
            return n == 2 ? new PairCase(1, o.qubit(), b, o.qubit()) : new PairCase(1, o.any(n), b, o.any(n));
        }
    },
    ONE_DIMENSION(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            return pair(r, scalar(r), scalar(r));
        }
    },
    BLOCH_VECTORS(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            GivenOperator a = o.bloch(length(r));
            GivenOperator b = r.nextInt(3) == 0 ? parallel(r) : o.bloch(length(r));
            return pair(r, r.nextInt(3) == 0 ? parallel(r) : a, b);
        }
    },
    HIDDEN_BLOCKS(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(3, 8);
            int k = o.dimension(1, n - 1);
            int[] order = shuffled(r, n);
            Matrix a =
                    permuted(sum(o.ofRank(k, o.dimension(1, k)), o.mixed(n - k).times(logUniform(r, -20, 0))), order);
            Matrix b = permuted(sum(o.mixed(k), o.ofRank(n - k, o.dimension(1, n - k))), order);
            return pair(r, GivenOperator.ofEntries(a), GivenOperator.ofEntries(b));
        }
    },
    ANY_SCALE(Promise.NARROW) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 5);
            double s = logUniform(r, -250, 250);
            double t = s * logUniform(r, -3, 3);
            return pair(
                    r,
                    GivenOperator.ofEntries(o.mixed(n).times(s)),
                    r.nextBoolean()
                            ? GivenOperator.ofEntries(o.mixed(n).times(t))
                            : GivenOperator.ofColumns(
                                    o.columns(n, o.dimension(1, n)).times(Math.sqrt(t))));
        }
    },
    DEEP_FACTORS(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            int k = o.dimension(1, n - 1);
            // no more columns than there are heavy rows, so that the columns are as independent as their directions
            return new PairCase(
                    1,
                    GivenOperator.ofColumns(o.scaledColumns(o.dimension(1, k), deep(r, n, k, false))),
                    weight(r),
                    GivenOperator.ofColumns(o.scaledColumns(o.dimension(1, n - k), deep(r, n, k, true))));
        }
    },
    DEEP_DEPENDENT_FACTORS(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            int k = o.dimension(1, n - 1);
            // more columns than heavy rows: they differ from dependent ones by 1e-30 only
            return new PairCase(
                    1,
                    GivenOperator.ofColumns(o.scaledColumns(o.dimension(k + 1, n + 1), deep(r, n, k, false))),
                    weight(r),
                    GivenOperator.ofColumns(o.scaledColumns(o.dimension(1, n), deep(r, n, k, true))));
        }
    },
    DEEP_ENTRIES(Promise.RELATIVE) {
        @Override
        PairCase draw(Random r, Operators o) {
            int n = o.dimension(2, 6);
            int k = o.dimension(1, n - 1);
            return new PairCase(
                    1,
                    GivenOperator.ofEntries(o.scaledEntries(deep(r, n, k, false))),
                    weight(r),
                    GivenOperator.ofEntries(o.scaledEntries(deep(r, n, k, true))));
        }
    };

    private final Promise promise;

    PairFamily(Promise promise) {
        this.promise = promise;
    }

    Promise promise() {
        return promise;
    }

    /** Draws one pair; the same random state gives the same pair. */
    abstract PairCase draw(Random r, Operators o);

    /** Draws the pair with this index, the same in every run. */
    final PairCase draw(int index) {
        Random r = new Random(seed(index));
        return draw(r, new Operators(r));
    }

    long seed(int index) {
        return 1_000_003L * (ordinal() + 1) + 7_919L * index;
    }

    private static PairCase pair(Random r, GivenOperator a, GivenOperator b) {
        return new PairCase(weight(r), a, weight(r), b);
    }

    private static double weight(Random r) {
        return logUniform(r, -2, 2);
    }

    private static Matrix roots(Matrix u, double[] p) {
        double[] root = new double[p.length];
        for (int i = 0; i < p.length; i++) {
            root[i] = Math.sqrt(p[i]);
        }
        return u.scaleColumns(root);
    }

    private static Matrix block(double[] p, int first, int size, Operators o) {
        Matrix b = o.mixed(size);
        Matrix m = new Matrix(p.length, p.length);
        for (int i = 0; i < size; i++) {
            for (int j = 0; j < size; j++) {
                m.re()[first + i][first + j] = b.re()[i][j];
                m.im()[first + i][first + j] = b.im()[i][j];
            }
        }
        return m;
    }

    private static Matrix rankOneMap(Random r, int k) {
        return Draw.gaussian(r, k, 1).times(Draw.gaussian(r, 1, k));
    }

    private static GivenOperator gradedColumns(Random r, Operators o, int n) {
        double[] p = o.graded(n, -300);
        return switch (r.nextInt(3)) {
            case 0 -> GivenOperator.ofDiagonal(p);
            case 1 -> GivenOperator.ofColumns(o.scaledColumns(o.dimension(1, n), p));
            default -> GivenOperator.ofColumns(roots(Draw.unitary(r, n), p));
        };
    }

    private static GivenOperator gradedEntries(Random r, Operators o, int n) {
        return r.nextBoolean()
                ? GivenOperator.ofEntries(o.scaledEntries(o.graded(n, -300)))
                : GivenOperator.ofEntries(Draw.withSpectrum(Draw.unitary(r, n), o.graded(n, -300)));
    }

    private static GivenOperator scalar(Random r) {
        double v = logUniform(r, -300, 3);
        double phase = r.nextGaussian();
        return switch (r.nextInt(4)) {
            case 0 -> GivenOperator.ofDiagonal(r.nextInt(4) == 0 ? 0 : v);
            case 1 -> GivenOperator.ofEntries(Draw.diagonal(v));
            case 2 -> GivenOperator.ofKet(new Matrix(new double[][] {{0.6}}, new double[][] {{0.8}}));
            // squares of the columns are in range as long as the columns are above 1e-150
            default ->
                GivenOperator.ofColumns(new Matrix(
                        new double[][] {{Math.sqrt(v)}}, new double[][] {{phase * Math.sqrt(v)}}));
        };
    }

    private static double length(Random r) {
        double[] some = {0, 1, 1 - 1e-12, 1e-9, 0.9};
        int i = r.nextInt(2 * some.length);
        return i < some.length ? some[i] : r.nextDouble();
    }

    private static GivenOperator parallel(Random r) {
        double z = 2 * r.nextDouble() - 1;
        return GivenOperator.ofBloch(0, 0, r.nextInt(4) == 0 ? Math.signum(z) : z);
    }

    private static int[] shuffled(Random r, int n) {
        int[] order = new int[n];
        for (int i = 0; i < n; i++) {
            int j = r.nextInt(i + 1);
            order[i] = order[j];
            order[j] = i;
        }
        return order;
    }

    private static Matrix sum(Matrix a, Matrix b) {
        int n = a.rows() + b.rows();
        Matrix m = new Matrix(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                boolean inA = i < a.rows() && j < a.rows();
                boolean inB = i >= a.rows() && j >= a.rows();
                if (inA || inB) {
                    Matrix s = inA ? a : b;
                    int shift = inA ? 0 : a.rows();
                    m.re()[i][j] = s.re()[i - shift][j - shift];
                    m.im()[i][j] = s.im()[i - shift][j - shift];
                }
            }
        }
        return m;
    }

    private static Matrix permuted(Matrix a, int[] order) {
        Matrix m = new Matrix(a.rows(), a.rows());
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.rows(); j++) {
                m.re()[order[i]][order[j]] = a.re()[i][j];
                m.im()[order[i]][order[j]] = a.im()[i][j];
            }
        }
        return m;
    }

    /** Sizes near one on one side of k, and between 1e-60 and 1e-58 on the other. */
    private static double[] deep(Random r, int n, int k, boolean reversed) {
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            p[i] = i < k != reversed ? logUniform(r, -2, 0) : logUniform(r, -62, -60);
        }
        return p;
    }
}
