package org.minorant.tests.oracle;

import org.hipparchus.linear.EigenDecompositionSymmetric;
import org.hipparchus.linear.MatrixUtils;
import org.hipparchus.linear.RealMatrix;
import org.minorant.tests.Draw.Matrix;

/**
 * Eigenvalues of a complex Hermitian matrix X + iY by Hipparchus, from the real symmetric matrix [[X, −Y], [Y, X]] of twice the size, which has each of
 * them twice; with a bound on their error.
 */
final class HipparchusSpectrum {

    private final int n;
    private final RealMatrix big;
    private final EigenDecompositionSymmetric eigen;

    HipparchusSpectrum(Matrix m) {
        n = m.rows();
        big = MatrixUtils.createRealMatrix(2 * n, 2 * n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                big.setEntry(i, j, m.re()[i][j]);
                big.setEntry(n + i, n + j, m.re()[i][j]);
                big.setEntry(i, n + j, -m.im()[i][j]);
                big.setEntry(n + i, j, m.im()[i][j]);
            }
        }
        eigen = new EigenDecompositionSymmetric(big);
    }

    /** The eigenvalues by decreasing size, each of them twice. */
    double[] doubled() {
        return eigen.getEigenvalues();
    }

    /**
     * A bound on each eigenvalue's error: ‖AV − VΛ‖_F + 2‖Λ‖‖V*V − 1‖_F as computed, and n·2^-50·‖A‖_F for the rounding of that computation (Weyl's theorem,
     * with V replaced by the nearest orthogonal matrix).
     */
    double error() {
        RealMatrix v = eigen.getV();
        RealMatrix residual = big.multiply(v).subtract(v.multiply(eigen.getD()));
        RealMatrix defect = v.transposeMultiply(v).subtract(MatrixUtils.createRealIdentityMatrix(2 * n));
        double norm = big.getFrobeniusNorm();
        return residual.getFrobeniusNorm() + 2 * norm * defect.getFrobeniusNorm() + 4 * n * norm * 0x1p-50;
    }

    /** V g(Λ) V*, read off the upper left and lower left blocks. */
    Matrix function(java.util.function.DoubleUnaryOperator g) {
        RealMatrix d = eigen.getD().copy();
        for (int i = 0; i < 2 * n; i++) {
            d.setEntry(i, i, g.applyAsDouble(d.getEntry(i, i)));
        }
        RealMatrix f = eigen.getV().multiply(d).multiplyTransposed(eigen.getV());
        Matrix m = new Matrix(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                m.re()[i][j] = f.getEntry(i, j);
                m.im()[i][j] = f.getEntry(n + i, j);
            }
        }
        return m;
    }
}
