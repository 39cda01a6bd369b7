package org.minorant.tests.containment;

import java.util.Random;
import org.minorant.tests.Draw;
import org.minorant.tests.Draw.Matrix;

/** Pairs of qubit states for many copies, ordinary and nasty ones. */
enum QubitFamily {
    /** Two Bloch vectors in the ball. */
    BALL {
        @Override
        Qubits draw(Random r, int i) {
            return new Qubits(bloch(Math.cbrt(r.nextDouble()), direction(r)), bloch(r.nextDouble(), direction(r)));
        }
    },
    /** Complex entries; what they mean is their positive part. */
    ENTRIES {
        @Override
        Qubits draw(Random r, int i) {
            return new Qubits(entries(r, r.nextDouble()), entries(r, Math.pow(10, -6 * r.nextDouble())));
        }
    },
    /** The same state twice. */
    EQUAL {
        @Override
        Qubits draw(Random r, int i) {
            GivenOperator a = i % 3 == 2 ? entries(r, 0.2) : bloch(i % 3 == 0 ? 0.7 : 0.999, direction(r));
            return new Qubits(a, a);
        }
    },
    /** Exactly parallel or antiparallel vectors on an axis. */
    COMMUTING {
        @Override
        Qubits draw(Random r, int i) {
            double x = r.nextDouble();
            double y = (i % 2 == 0 ? 1 : -1) * r.nextDouble();
            return switch (i % 3) {
                case 0 -> new Qubits(GivenOperator.ofBloch(0, 0, x), GivenOperator.ofBloch(0, 0, y));
                case 1 -> new Qubits(GivenOperator.ofBloch(x, 0, 0), GivenOperator.ofBloch(y, 0, 0));
                default ->
                    new Qubits(
                            GivenOperator.ofBloch(x / 2, x / 2, x / 4), GivenOperator.ofBloch(-x / 4, -x / 4, -x / 8));
            };
        }
    },
    /** Antiparallel up to the rounding of directions. */
    ANTIPARALLEL {
        @Override
        Qubits draw(Random r, int i) {
            double[] u = direction(r);
            return new Qubits(bloch(0.2 + 0.79 * r.nextDouble(), u), bloch(-0.2 - 0.79 * r.nextDouble(), u));
        }
    },
    /** Two orthogonal kets, or nearly: whatever remains comes from their rounding. */
    ORTHOGONAL {
        @Override
        Qubits draw(Random r, int i) {
            if (i % 2 == 0) {
                return new Qubits(GivenOperator.ofBloch(0, 0, 1), GivenOperator.ofBloch(0, 0, -1));
            }
            Matrix u = Draw.unitary(r, 2);
            return new Qubits(ket(u, 0), ket(u, 1));
        }

        @Override
        boolean isRelative() {
            return false;
        }
    },
    /** A ket against a mixed state. */
    PURE_AND_MIXED {
        @Override
        Qubits draw(Random r, int i) {
            GivenOperator pure = i % 2 == 0 ? ket(Draw.unitary(r, 2), 0) : GivenOperator.ofBloch(0, 1, 0);
            GivenOperator mixed = bloch(0.98 * r.nextDouble(), direction(r));
            return i % 3 == 0 ? new Qubits(mixed, pure) : new Qubits(pure, mixed);
        }
    },
    /** Lengths within 1e-10 of one. */
    NEARLY_PURE {
        @Override
        Qubits draw(Random r, int i) {
            return new Qubits(bloch(1 - 1e-10, direction(r)), bloch(i % 2 == 0 ? 1 - 1e-10 : 0.9, direction(r)));
        }
    },
    /** Kets and unit vectors as rounded entries, with or without a tiny negative eigenvalue. */
    PURE_ENTRIES {
        @Override
        Qubits draw(Random r, int i) {
            return new Qubits(entries(r, 0), i % 2 == 0 ? entries(r, 0) : bloch(0.8, direction(r)));
        }

        @Override
        boolean isRelative() {
            return false;
        }
    },
    /** Unit vectors, a little longer or shorter than one by rounding. */
    UNIT_VECTORS {
        @Override
        Qubits draw(Random r, int i) {
            return new Qubits(bloch(1, direction(r)), i % 2 == 0 ? bloch(1, direction(r)) : bloch(0.7, direction(r)));
        }

        @Override
        boolean isRelative() {
            return false;
        }
    },
    /** Vectors 1e-12 apart. */
    NEARLY_EQUAL {
        @Override
        Qubits draw(Random r, int i) {
            double[] u = direction(r);
            double s = i % 2 == 0 ? 0.9 : 0.3;
            double e = 1e-12;
            return new Qubits(bloch(s, u), bloch(s, new double[] {u[0] + e * r.nextGaussian(), u[1] + e, u[2] - e}));
        }
    },
    /** Lengths near 1e-10, or one of them zero. */
    NEARLY_MIXED {
        @Override
        Qubits draw(Random r, int i) {
            GivenOperator b = bloch(i % 3 == 0 ? 0 : 1e-10 * r.nextDouble(), direction(r));
            return new Qubits(bloch(i % 3 == 1 ? 0.4 : 1e-10, direction(r)), b);
        }
    },
    /** Vectors of exactly equal lengths: every block is singular. */
    EQUAL_LENGTHS {
        @Override
        Qubits draw(Random r, int i) {
            double[] u = direction(r);
            double s = 0.2 + 0.79 * r.nextDouble();
            return new Qubits(
                    bloch(s, u),
                    bloch(s, i % 2 == 0 ? new double[] {u[2], -u[0], u[1]} : new double[] {u[1], u[0], u[2]}));
        }
    },
    /** Vectors almost in one line, at angles of 1e-8. */
    NEARLY_PARALLEL {
        @Override
        Qubits draw(Random r, int i) {
            double[] u = direction(r);
            double sign = i % 2 == 0 ? 1 : -1;
            return new Qubits(bloch(0.9 * r.nextDouble(), u), bloch(sign * 0.9 * r.nextDouble(), new double[] {
                u[0] + 1e-8, u[1] - 1e-8, u[2]
            }));
        }
    },
    /** Vectors within rounding of one line, far shorter than one. */
    SHORT_AND_PARALLEL {
        @Override
        Qubits draw(Random r, int i) {
            double[] u = direction(r);
            double s = i % 2 == 0 ? 1e-14 : 1e-160;
            return new Qubits(bloch(s, u), bloch(0.6, u));
        }
    },
    /** One state by its entries, one by its vector, their eigenvalues far apart. */
    GRADED {
        @Override
        Qubits draw(Random r, int i) {
            double small = Draw.logUniform(r, -12, -2);
            return new Qubits(
                    GivenOperator.ofDiagonal(1 - small, small),
                    bloch(1 - 2 * Draw.logUniform(r, -12, -2), direction(r)));
        }
    };

    abstract Qubits draw(Random random, int index);

    /** The same pair for the same index. */
    Qubits draw(int index) {
        return draw(new Random(1000L * ordinal() + index), index);
    }

    /** Whether the data fix the minimum error to relative accuracy. */
    boolean isRelative() {
        return true;
    }

    /**
     * Two states.
     *
     * @param first ρ
     * @param second σ
     */
    record Qubits(GivenOperator first, GivenOperator second) {

        @Override
        public String toString() {
            return "  ρ by " + first + "\n  σ by " + second;
        }
    }

    private static double[] direction(Random r) {
        double x = r.nextGaussian();
        double y = r.nextGaussian();
        double z = r.nextGaussian();
        double s = Math.sqrt(x * x + y * y + z * z);
        return new double[] {x / s, y / s, z / s};
    }

    private static GivenOperator bloch(double s, double[] u) {
        return GivenOperator.ofBloch(s * u[0], s * u[1], s * u[2]);
    }

    private static GivenOperator ket(Matrix basis, int column) {
        Matrix k = new Matrix(2, 1);
        for (int i = 0; i < 2; i++) {
            k.re()[i][0] = basis.re()[i][column];
            k.im()[i][0] = basis.im()[i][column];
        }
        return GivenOperator.ofKet(k);
    }

    private static GivenOperator entries(Random r, double small) {
        Matrix m =
                Draw.withSpectrum(Draw.unitary(r, 2), 1 - small / 2, small / 2).hermitian();
        return GivenOperator.ofEntries(m);
    }
}
