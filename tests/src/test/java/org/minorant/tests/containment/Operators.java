package org.minorant.tests.containment;

import static org.minorant.tests.Draw.logUniform;

import java.util.Random;
import org.minorant.tests.Draw;
import org.minorant.tests.Draw.Matrix;

/** Draws single operators in the forms that a user may give. */
final class Operators {

    private final Random random;

    Operators(Random random) {
        this.random = random;
    }

    int dimension(int least, int most) {
        return least + random.nextInt(most - least + 1);
    }

    /** GG* of a square Gaussian matrix, of trace about one. */
    Matrix mixed(int n) {
        return ofRank(n, n);
    }

    /** Entries of GG*, G an n × rank matrix: rounding makes some of the n − rank zero eigenvalues negative. */
    Matrix ofRank(int n, int rank) {
        Matrix x = columns(n, rank);
        return x.times(x.adjoint()).hermitian();
    }

    /** Gaussian columns with squares that sum to about one. */
    Matrix columns(int n, int rank) {
        Matrix g = random.nextInt(4) == 0 ? real(n, rank) : Draw.gaussian(random, n, rank);
        return g.times(1 / Math.sqrt(squares(g)));
    }

    private Matrix real(int n, int rank) {
        Matrix g = Draw.gaussian(random, n, rank);
        return new Matrix(g.re(), new double[n][rank]);
    }

    static double squares(Matrix g) {
        double s = 0;
        for (int i = 0; i < g.rows(); i++) {
            for (int j = 0; j < g.columns(); j++) {
                s += g.re()[i][j] * g.re()[i][j] + g.im()[i][j] * g.im()[i][j];
            }
        }
        return s;
    }

    /** A normalised column. */
    Matrix ket(int n) {
        return columns(n, 1);
    }

    /** Eigenvalues that sum to about one, each a random share. */
    double[] spectrum(int n) {
        double[] p = new double[n];
        double sum = 0;
        for (int i = 0; i < n; i++) {
            p[i] = -StrictMath.log(1 - random.nextDouble());
            sum += p[i];
        }
        for (int i = 0; i < n; i++) {
            p[i] /= sum;
        }
        return p;
    }

    /** Eigenvalues that come in a few repeated values, exactly. */
    double[] repeated(int n) {
        double[] choice = {0, 0.25, 0.25, 1, 0.125};
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            p[i] = choice[random.nextInt(choice.length)];
        }
        p[random.nextInt(n)] = 0.5;
        return p;
    }

    /** Eigenvalues within 1e-15 to 1e-9 of each other, in one or two clusters. */
    double[] clustered(int n) {
        double spread = logUniform(random, -15, -9);
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            p[i] = (random.nextBoolean() ? 0.25 : 0.75) * (1 + spread * random.nextGaussian());
        }
        return p;
    }

    /** Eigenvalues spread over decades, the first of order one. */
    double[] graded(int n, double leastPower) {
        double[] p = new double[n];
        for (int i = 0; i < n; i++) {
            p[i] = i == 0 ? 1 : logUniform(random, leastPower, 0);
        }
        return p;
    }

    /** D H D with H well-conditioned of unit diagonal and D² the given sizes: positive definite, every decade of it meant. */
    Matrix scaledEntries(double... sizes) {
        int n = sizes.length;
        Matrix g = Draw.gaussian(random, n, 3 * n);
        Matrix h = g.times(g.adjoint()).hermitian();
        Matrix m = new Matrix(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                double w = Math.sqrt(sizes[i] / h.re()[i][i]) * Math.sqrt(sizes[j] / h.re()[j][j]);
                m.re()[i][j] = i == j ? sizes[i] : h.re()[i][j] * w;
                m.im()[i][j] = h.im()[i][j] * w;
            }
        }
        return m.hermitian();
    }

    /** Columns with row i scaled by the root of sizes[i]. */
    Matrix scaledColumns(int rank, double... sizes) {
        Matrix g = Draw.gaussian(random, sizes.length, rank);
        for (int i = 0; i < sizes.length; i++) {
            for (int j = 0; j < rank; j++) {
                g.re()[i][j] *= Math.sqrt(sizes[i]);
                g.im()[i][j] *= Math.sqrt(sizes[i]);
            }
        }
        return g;
    }

    /** Some form of a qubit. */
    GivenOperator qubit() {
        double p = random.nextDouble();
        return switch (random.nextInt(5)) {
            case 0 -> GivenOperator.ofEntries(mixed(2));
            case 1 -> GivenOperator.ofKet(ket(2));
            case 2 -> GivenOperator.ofColumns(columns(2, 1 + random.nextInt(3)));
            case 3 -> bloch(random.nextDouble());
            default -> GivenOperator.ofDiagonal(p, 1 - p);
        };
    }

    /** A Bloch vector of about this length and a random direction. */
    GivenOperator bloch(double length) {
        double[] v = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
        double norm = Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
        return GivenOperator.ofBloch(length * v[0] / norm, length * v[1] / norm, length * v[2] / norm);
    }

    /** Some form of an operator on n dimensions. */
    GivenOperator any(int n) {
        return switch (random.nextInt(4)) {
            case 0 -> GivenOperator.ofEntries(mixed(n));
            case 1 -> GivenOperator.ofKet(ket(n));
            case 2 -> GivenOperator.ofColumns(columns(n, 1 + random.nextInt(n + 1)));
            default -> GivenOperator.ofDiagonal(spectrum(n));
        };
    }
}
