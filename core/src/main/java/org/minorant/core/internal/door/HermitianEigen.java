package org.minorant.core.internal.door;

import org.ojalgo.matrix.decomposition.Eigenvalue;
import org.ojalgo.matrix.store.GenericStore;
import org.ojalgo.matrix.store.MatrixStore;
import org.ojalgo.matrix.store.R064Store;
import org.ojalgo.scalar.ComplexNumber;

/**
 * Eigenvalues and orthonormal eigenvectors of a Hermitian matrix, in double, not certified.
 *
 * <p>The matrix is scaled to order one by a power of two first: the dependency's complex solver is silently wrong for
 * entries below about 1e-15. Values come in ascending order, column j of the vectors belongs to value j.
 */
public final class HermitianEigen {

    private final int n;
    private final double[] values;
    private final double[] re;
    private final double[] im;

    private HermitianEigen(int n) {
        this.n = n;
        this.values = new double[n];
        this.re = new double[n * n];
        this.im = new double[n * n];
    }

    /**
     * Decomposes a Hermitian matrix.
     *
     * @param n the dimension
     * @param are real parts, row-major, symmetric, finite
     * @param aim imaginary parts, row-major, antisymmetric, finite; empty for a real matrix
     * @return the decomposition
     */
    public static HermitianEigen of(int n, double[] are, double[] aim) {
        HermitianEigen out = new HermitianEigen(n);
        double largest = 0;
        for (double v : are) {
            largest = Math.max(largest, Math.abs(v));
        }
        for (double v : aim) {
            largest = Math.max(largest, Math.abs(v));
        }
        if (!(largest < Double.POSITIVE_INFINITY)) {
            throw new IllegalStateException("entries must be finite and are not");
        }
        if (largest == 0) {
            for (int i = 0; i < n; i++) {
                out.re[i * n + i] = 1;
            }
            return out;
        }
        int shift = -Math.getExponent(largest);
        if (aim.length == 0) {
            out.real(are, shift);
        } else {
            out.complex(are, aim, shift);
        }
        return out;
    }

    private void real(double[] a, int shift) {
        R064Store m = R064Store.FACTORY.make(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                m.set(i, j, Math.scalb(a[i * n + j], shift));
            }
        }
        Eigenvalue<Double> e = Eigenvalue.R064.make(n, true);
        if (!e.decompose(m)) {
            throw new ArithmeticException("the symmetric eigenvalue iteration did not converge at dimension " + n);
        }
        MatrixStore<Double> v = e.getV();
        int[] order = order(i -> e.getD().doubleValue(i, i));
        for (int j = 0; j < n; j++) {
            values[j] = Math.scalb(e.getD().doubleValue(order[j], order[j]), -shift);
            for (int i = 0; i < n; i++) {
                re[i * n + j] = v.doubleValue(i, order[j]);
            }
        }
    }

    private void complex(double[] are, double[] aim, int shift) {
        GenericStore<ComplexNumber> m = GenericStore.C128.make(n, n);
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                m.set(i, j, ComplexNumber.of(Math.scalb(are[i * n + j], shift), Math.scalb(aim[i * n + j], shift)));
            }
        }
        Eigenvalue<ComplexNumber> e = Eigenvalue.C128.make(n, true);
        if (!e.decompose(m)) {
            throw new ArithmeticException("the Hermitian eigenvalue iteration did not converge at dimension " + n);
        }
        MatrixStore<ComplexNumber> v = e.getV();
        int[] order = order(i -> e.getD().get(i, i).getReal());
        for (int j = 0; j < n; j++) {
            values[j] = Math.scalb(e.getD().get(order[j], order[j]).getReal(), -shift);
            for (int i = 0; i < n; i++) {
                ComplexNumber z = v.get(i, order[j]);
                re[i * n + j] = z.getReal();
                im[i * n + j] = z.getImaginary();
            }
        }
    }

    private int[] order(java.util.function.IntToDoubleFunction value) {
        return java.util.stream.IntStream.range(0, n)
                .boxed()
                .sorted((a, b) -> Double.compare(value.applyAsDouble(a), value.applyAsDouble(b)))
                .mapToInt(Integer::intValue)
                .toArray();
    }

    /** Eigenvalues, ascending; owned by the caller from here on. */
    public double[] values() {
        return values;
    }

    /** Real parts of the eigenvectors, row-major, one column each. */
    public double[] vectorsRe() {
        return re;
    }

    /** Imaginary parts of the eigenvectors, row-major, one column each. */
    public double[] vectorsIm() {
        return im;
    }
}
