package org.minorant.core;

import java.io.BufferedOutputStream;
import java.io.IOException;
import java.io.OutputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import org.minorant.core.internal.file.NpyFormat;

/**
 * Operators in the {@code .npy} format, an open binary format for one array.
 *
 * <p><b>Accepted.</b> Versions 1.0, 2.0 and 3.0; types {@code <f8}, {@code >f8}, {@code <c16} and {@code >c16} (float64 and complex128 in
 * either byte order); row-major and column-major order; two dimensions, or one, which makes a matrix of one column. The header must be
 * exactly the dictionary of {@code descr}, {@code fortran_order} and {@code shape}, then spaces and a line feed, at most 64 KiB; it is
 * parsed, never evaluated.
 *
 * <p><b>Refused</b>, with the byte counted from 0: everything else, and in particular other types, empty arrays, NaN and infinities, and a
 * file that is longer or shorter than its header declares.
 *
 * <p><b>Memory.</b> Only regular files are read, for others have no length. The declared shape is compared with the length of the file
 * before anything is allocated. A matrix of which four copies do not fit in the heap is refused.
 *
 * <p><b>Written</b> files are version 1.0 (the others are for headers above 64 KiB and for field names), row-major, little-endian, and read
 * back to the same bits. A state that was given by a ket or a factor is written by its entries, which are a rounded copy of it; a ket can
 * be written as a matrix of one column instead.
 *
 * <p>Stateless and thread-safe. Source: R. Kern, A simple file format for NumPy arrays, NEP 1 (2007), and its later text on versions 2 and
 * 3, from memory.
 */
public final class NumpyFile {

    private static final OperatorFiles FILES = new OperatorFiles("NumpyFile", NpyFormat::parse);

    private NumpyFile() {}

    /**
     * Reads a matrix of any shape; an array of one dimension is a matrix of one column.
     *
     * @param path the file
     * @return the operator
     * @throws InvalidInputException if the file is not of this format or refused as said above
     * @throws IOException if the file cannot be read
     */
    public static Operator readOperator(Path path) throws IOException {
        return FILES.operator(path);
    }

    /**
     * Reads an exactly Hermitian matrix.
     *
     * @param path the file
     * @return the operator
     * @throws InvalidInputException if the file is refused, or as {@link HermitianOperator#of(Operator)}
     * @throws IOException if the file cannot be read
     */
    public static HermitianOperator readHermitianOperator(Path path) throws IOException {
        return FILES.hermitian(path);
    }

    /**
     * Reads a positive matrix.
     *
     * @param path the file
     * @return the operator
     * @throws InvalidInputException if the file is refused, or as {@link PositiveOperator#of(Operator)}
     * @throws IOException if the file cannot be read
     */
    public static PositiveOperator readPositiveOperator(Path path) throws IOException {
        return FILES.positive(path);
    }

    /**
     * Reads a state: a density matrix, or a normalised ket as an array of one dimension or of one column.
     *
     * @param path the file
     * @return the state
     * @throws InvalidInputException if the file is refused, or as {@link DensityOperator#of(Operator)} or {@link
     *     DensityOperator#ofKet(double[], double[])}
     * @throws IOException if the file cannot be read
     */
    public static DensityOperator readDensityOperator(Path path) throws IOException {
        return FILES.density(path);
    }

    /**
     * Writes an operator as an array of two dimensions, replacing the file: float64 if it is real, complex128 otherwise.
     *
     * @param path the file
     * @param a the operator
     * @throws IOException if the file cannot be written; what is left of it is then incomplete
     */
    public static void write(Path path, Operator a) throws IOException {
        try (OutputStream out = new BufferedOutputStream(Files.newOutputStream(path))) {
            NpyFormat.write(out, a);
        }
    }
}
