package org.minorant.core;

import java.io.BufferedWriter;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import org.minorant.core.internal.file.MatrixMarketParser;
import org.minorant.core.internal.file.MatrixMarketWriter;

/**
 * Operators in the Matrix Market exchange format, an open text format.
 *
 * <pre>
 * %%MatrixMarket matrix array complex hermitian
 * % a comment
 * 2 2
 * 0.5 0
 * 0 0.25
 * 0.5 0
 * </pre>
 *
 * <p><b>Accepted.</b> Layout array or coordinate; field real, complex, integer (whole numbers up to 2^53) or, in the coordinate layout,
 * pattern (every listed entry is one); symmetry general, symmetric, skew-symmetric or hermitian. The banner may be in any case. Comments
 * stand between the banner and the size line, blank lines anywhere after the banner. Indices start at 1. One entry on each line, lines of
 * at most 1024 characters. Symmetric storage lists the lower triangle (row at least column) only, and the diagonal of a hermitian matrix is
 * real.
 *
 * <p><b>Refused</b>, with the line: everything else, and in particular entries in the upper triangle of symmetric storage; an entry listed
 * twice; NaN, infinity, and numbers too large for a double; text after the last entry. A number is rounded to the nearest double.
 *
 * <p><b>Memory.</b> Only regular files are read, for others have no length. What the file declares is compared with its length before
 * anything is allocated. A coordinate file may declare up to 2^24 entries (dimension 4096), more only if an eighth of them are listed. A
 * matrix of which four copies do not fit in the heap is refused.
 *
 * <p><b>Written</b> files read back to the same bits: each number has the fewest of 15, 16 or 17 digits that do. A state that was given by
 * a ket or a factor is written by its entries, which are a rounded copy of it; a ket can be written as a matrix of one column instead.
 *
 * <p>Stateless and thread-safe. Source: R. F. Boisvert, R. Pozo, K. A. Remington, The Matrix Market exchange formats: initial design,
 * NISTIR 5935 (1996), from memory.
 */
public final class MatrixMarket {

    private static final OperatorFiles FILES = new OperatorFiles("MatrixMarket", MatrixMarketParser::parse);

    private MatrixMarket() {}

    /**
     * Reads a matrix of any shape.
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
     * Reads an exactly Hermitian matrix; the storage may be general.
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
     * Reads a state: a density matrix, or a normalised ket as a matrix of one column.
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
     * Writes an operator in the array layout, replacing the file. The field is real or complex, the symmetry symmetric or hermitian if the
     * operator is {@link HermitianOperator} by type, general otherwise.
     *
     * @param path the file
     * @param a the operator
     * @throws IOException if the file cannot be written; what is left of it is then incomplete
     */
    public static void write(Path path, Operator a) throws IOException {
        write(path, a, MatrixMarketLayout.ARRAY);
    }

    /**
     * Writes an operator in a chosen layout, otherwise as {@link #write(Path, Operator)}.
     *
     * @param path the file
     * @param a the operator
     * @param layout how entries are listed
     * @throws IOException if the file cannot be written; what is left of it is then incomplete
     */
    public static void write(Path path, Operator a, MatrixMarketLayout layout) throws IOException {
        try (BufferedWriter out = Files.newBufferedWriter(path, StandardCharsets.US_ASCII)) {
            MatrixMarketWriter.write(out, a, layout);
        }
    }
}
