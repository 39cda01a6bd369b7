package org.minorant.core.internal.message;

import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;

/** Checks of shapes, finiteness and memory; every one names position, value, limit and cure, and NaN fails it. */
public final class Checks {

    private Checks() {}

    /** Refuses shapes that are empty or whose entries cannot be held, before anything is allocated. */
    public static void dimensions(String asked, long rows, long columns) {
        if (rows < 1 || columns < 1) {
            throw new InvalidInputException(
                    asked, "the shape is " + rows + " x " + columns, "at least 1 x 1", "give at least one entry");
        }
        // saturates: sixteen times the largest shape does not fit in a long
        long bytes = rows > Long.MAX_VALUE / 16 / columns ? Long.MAX_VALUE : 16 * rows * columns;
        long limit = Math.min(Runtime.getRuntime().maxMemory(), 16L * Integer.MAX_VALUE);
        if (bytes > limit) {
            throw new InvalidInputException(
                    asked,
                    "the shape is " + rows + " x " + columns + ", which takes " + bytes + " bytes",
                    "at most " + limit + " bytes",
                    "reduce the dimension or raise the heap (-Xmx)");
        }
    }

    /** Refuses arrays that are empty, ragged or of different shapes. */
    public static void sameShape(String asked, double[][] re, double[][] im) {
        rectangular(asked + ", real part", re);
        rectangular(asked + ", imaginary part", im);
        if (re.length != im.length || re[0].length != im[0].length) {
            throw new InvalidInputException(
                    asked,
                    "the imaginary part is " + im.length + " x " + im[0].length,
                    re.length + " x " + re[0].length + ", as the real part",
                    "give both parts the same shape");
        }
    }

    /** Copies a rectangular array of finite numbers into row-major order. */
    public static double[] flatten(String asked, double[][] a) {
        rectangular(asked, a);
        dimensions(asked, a.length, a[0].length);
        int n = a[0].length;
        double[] flat = new double[a.length * n];
        for (int i = 0; i < a.length; i++) {
            System.arraycopy(a[i], 0, flat, i * n, n);
            for (int j = 0; j < n; j++) {
                if (!Double.isFinite(a[i][j])) {
                    throw notFinite(asked, "entry (" + i + ", " + j + ")", a[i][j]);
                }
            }
        }
        return flat;
    }

    private static void rectangular(String asked, double[][] a) {
        if (a.length == 0 || a[0].length == 0) {
            throw new InvalidInputException(asked, "the array is empty", "at least 1 x 1", "give at least one entry");
        }
        for (int i = 1; i < a.length; i++) {
            if (a[i].length != a[0].length) {
                throw new InvalidInputException(
                        asked,
                        "row " + i + " has " + a[i].length + " entries",
                        a[0].length + ", as row 0",
                        "give every row the same length");
            }
        }
    }

    /** Refuses an array of the wrong length. */
    public static void length(String asked, double[] a, int length) {
        if (a.length != length) {
            throw new InvalidInputException(
                    asked, "the array has " + a.length + " entries", length + " entries", "check the shape");
        }
    }

    /** Returns the array if every entry is finite. */
    public static double[] finite(String asked, double[] a) {
        for (int i = 0; i < a.length; i++) {
            if (!Double.isFinite(a[i])) {
                throw notFinite(asked, "entry " + i + " (row-major)", a[i]);
            }
        }
        return a;
    }

    private static InvalidInputException notFinite(String asked, String where, double value) {
        return new InvalidInputException(
                asked, where + " is " + value, "a finite number", "check the computation that made it");
    }

    /** Refuses an operator that is not square. */
    public static void square(String asked, Operator a) {
        if (a.rows() != a.columns()) {
            throw new InvalidInputException(
                    asked, "the operator is " + a.rows() + " x " + a.columns(), "a square operator", "check the shape");
        }
    }

    /** Refuses operators of different shapes. */
    public static void equalShapes(String asked, Operator a, Operator b) {
        if (a.rows() != b.rows() || a.columns() != b.columns()) {
            throw new InvalidInputException(
                    asked,
                    "the second operator is " + b.rows() + " x " + b.columns(),
                    a.rows() + " x " + a.columns() + ", as the first",
                    "both must act on the same space");
        }
    }

    /** Refuses a number outside a closed range; NaN is outside. */
    public static double inRange(String asked, String name, double value, double least, double most) {
        if (!(value >= least && value <= most)) {
            throw new InvalidInputException(
                    asked, name + " is " + value, "between " + least + " and " + most, "give a number in that range");
        }
        return value;
    }
}
