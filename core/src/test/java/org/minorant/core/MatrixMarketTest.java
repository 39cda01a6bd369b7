package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.EnumSource;
import org.minorant.core.internal.file.FileSource;
import org.minorant.core.internal.file.MatrixMarketParser;
import org.minorant.core.internal.file.RawMatrix;

class MatrixMarketTest {

    @TempDir
    Path dir;

    private Path file(String text) throws IOException {
        return Files.writeString(dir.resolve("a.mtx"), text);
    }

    private Operator read(String... lines) throws IOException {
        return MatrixMarket.readOperator(file(String.join("\n", lines)));
    }

    private static Operator real(double[]... rows) {
        return Operator.ofReal(rows);
    }

    @Test
    void arraysAreListedColumnByColumn() throws IOException {
        assertEquals(
                real(new double[] {1, 2, 3}, new double[] {4, 5, 6}),
                read("%%MatrixMarket matrix array real general", "2 3", "1", "4", "2", "5", "3", "6"));
    }

    @Test
    void complexEntriesAreTwoNumbers() throws IOException {
        assertEquals(
                Operator.of(new double[][] {{1, -3}}, new double[][] {{2e-3, .5}}),
                read("%%MatrixMarket matrix array complex general", "1 2", "1 2e-3", "-3. +.5E0"));
    }

    @Test
    void symmetricStorageListsTheLowerTriangle() throws IOException {
        assertEquals(
                real(new double[] {1, 2}, new double[] {2, 3}),
                read("%%MatrixMarket matrix array real symmetric", "2 2", "1", "2", "3"));
        assertEquals(
                Operator.of(new double[][] {{1, 2}, {2, 3}}, new double[][] {{5, 6}, {6, 7}}),
                read("%%MatrixMarket matrix array complex symmetric", "2 2", "1 5", "2 6", "3 7"));
    }

    @Test
    void hermitianStorageConjugatesTheUpperTriangle() throws IOException {
        Operator expected = Operator.of(new double[][] {{1, 2}, {2, 3}}, new double[][] {{0, -6}, {6, 0}});
        assertEquals(expected, read("%%MatrixMarket matrix array complex hermitian", "2 2", "1 0", "2 6", "3 -0.0"));
        assertEquals(
                expected,
                read("%%MatrixMarket matrix coordinate complex hermitian", "2 2 3", "2 2 3 0", "1 1 1 0", "2 1 2 6"));
    }

    @Test
    void skewSymmetricStorageLeavesTheDiagonalOut() throws IOException {
        Operator expected = real(new double[] {0, -2, 4}, new double[] {2, 0, -3}, new double[] {-4, 3, 0});
        assertEquals(expected, read("%%MatrixMarket matrix array real skew-symmetric", "3 3", "2", "-4", "3"));
        assertEquals(
                expected,
                read("%%MatrixMarket matrix coordinate integer skew-symmetric", "3 3 3", "3 2 3", "2 1 2", "3 1 -4"));
    }

    @Test
    void coordinatesStartAtOneAndOthersAreZero() throws IOException {
        assertEquals(
                real(new double[] {0, 0, 7}, new double[] {0, -1.5, 0}),
                read("%%MatrixMarket matrix coordinate real general", "2 3 2", "1 3 7", "2 2 -1.5"));
        assertEquals(real(new double[] {0}), read("%%MatrixMarket matrix coordinate real general", "1 1 0"));
    }

    @Test
    void patternEntriesAreOne() throws IOException {
        assertEquals(
                real(new double[] {0, 1}, new double[] {1, 0}),
                read("%%MatrixMarket matrix coordinate pattern symmetric", "2 2 1", "2 1"));
    }

    @Test
    void bannerInAnyCaseCommentsBlankLinesAndLineEndsAreAccepted() throws IOException {
        String text =
                "%%matrixmarket  MATRIX\tArray Real GENERAL \r\n%\r\n% größe, 50 %\r\n\r\n  1 2 \r\n\r\n 1 \r\n\t\r\n2\r\n\r\n";
        assertEquals(real(new double[] {1, 2}), MatrixMarket.readOperator(file(text)));
    }

    @Test
    void numbersRoundToTheNearestDouble() throws IOException {
        assertEquals(
                real(new double[] {0.1, 0, Double.MIN_VALUE}),
                read("%%MatrixMarket matrix array real general", "1 3", "0.10000000000000000001", "1e-400", "5e-324"));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            ignoreLeadingAndTrailingWhitespace = false,
            quoteCharacter = '`',
            value = {
                "hello|, line 1: the file starts with \"hello\", expected %%MatrixMarket; check that this is a Matrix Market file",
                "%%MatrixMarket matrix array real|, line 1: the banner is \"%%MatrixMarket matrix array real\", expected %%MatrixMarket matrix, "
                        + "then array or coordinate, a field and a symmetry; complete the banner",
                "%%MatrixMarket matrix dense real general|, line 1: the layout is \"dense\", expected array or coordinate; correct the banner",
                "%%MatrixMarket matrix array quaternion general|, line 1: the field is \"quaternion\", expected real or complex or integer or "
                        + "pattern; correct the banner",
                "%%MatrixMarket matrix array real odd|, line 1: the symmetry is \"odd\", expected general or symmetric or skew-symmetric or "
                        + "hermitian; correct the banner",
                "%%MatrixMarket matrix array real hermitian|, line 1: the banner combines array, real and hermitian, expected hermitian with "
                        + "complex only, pattern with coordinate and general or symmetric only; correct the banner",
                "%%MatrixMarket matrix array pattern general|, line 1: the banner combines array, pattern and general, expected hermitian with "
                        + "complex only, pattern with coordinate and general or symmetric only; correct the banner",
                "%%MatrixMarket matrix coordinate pattern skew-symmetric|, line 1: the banner combines coordinate, pattern and skew-symmetric, "
                        + "expected hermitian with complex only, pattern with coordinate and general or symmetric only; correct the banner",
            })
    void badBannersAreRefused(String banner, String message) {
        refused(banner + "\n1 1\n1\n", message);
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "1 1 1|, line 2: the size line has 3 words, expected 2 whole numbers; give rows and columns, and for coordinate files the number "
                        + "of entries",
                "0 1|, line 2: a count or index is \"0\", expected a whole number from 1 to 2147483647; correct it; indices start at 1",
                "-2 1|, line 2: a count or index is \"-2\", expected a whole number from 1 to 2147483647; correct it; indices start at 1",
                "1.0 1|, line 2: a count or index is \"1.0\", expected a whole number from 1 to 2147483647; correct it; indices start at 1",
                "99999999999999999999 1|, line 2: a count or index is \"99999999999999999999\", expected a whole number from 1 to 2147483647; "
                        + "correct it; indices start at 1",
                "3 1|, line 2: the size line declares 3 entries, expected at most 2, for 4 bytes follow; the file is truncated or the counts are "
                        + "wrong",
            })
    void badSizesAreRefused(String sizes, String message) {
        refused("%%MatrixMarket matrix array real general\n" + sizes + "\n1.5\n", message);
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "NaN",
                "nan",
                "inf",
                "Infinity",
                "0x1p3",
                "1f",
                "1d",
                "1e",
                "e5",
                ".",
                "-",
                "1..2",
                "1e999",
                "-1e999",
                "1_0",
                "0,5",
                "١"
            })
    void onlyFiniteDecimalNumbersAreAccepted(String word) {
        String shown = word.equals("١") ? "??" : word;
        refused(
                "%%MatrixMarket matrix array real general\n1 2\n1\n" + word + "\n",
                ", line 4: a value is \"" + shown
                        + "\", expected a finite decimal number such as -1.5e-3; correct the entry");
    }

    @ParameterizedTest
    @CsvSource({"1.0", "9007199254740993", "1e3", "--1"})
    void integerFieldHoldsWholeNumbersThatADoubleHolds(String word) {
        refused(
                "%%MatrixMarket matrix array integer general\n1 1\n" + word + "\n",
                ", line 3: a value is \"" + word
                        + "\", expected a whole number of at most 2^53 in magnitude; correct the entry");
    }

    @Test
    void wrongNumbersOfWordsAndEntriesAreRefused() {
        refused(
                "%%MatrixMarket matrix array complex general\n1 1\n1   \n",
                ", line 3: entry 1 has 1 words, expected 2, for the banner is %%MatrixMarket matrix array complex general; write one entry on each "
                        + "line");
        refused(
                "%%MatrixMarket matrix array real general\n1 2\n1 2\n",
                ", line 3: entry 1 has 2 words, expected 1, for the banner is %%MatrixMarket matrix array real general; write one entry on each line");
        refused(
                "%%MatrixMarket matrix array real general\n1 2\n1.25\n",
                ", line 3: the file ends here, expected entry 2 of 2; the file is truncated or the counts are wrong");
        refused(
                "%%MatrixMarket matrix array real general\n1 1\n1\n\n2\n",
                ", line 5: after the last of 1 entries comes \"2\", expected the end of the file; correct the counts on the size line");
        refused(
                "%%MatrixMarket matrix array real general\n% only a comment\n",
                ", line 2: the file ends here, expected the size line; the file is truncated or the counts are wrong");
    }

    @Test
    void badCoordinatesAreRefused() {
        String general = "%%MatrixMarket matrix coordinate real general\n2 2 ";
        refused(
                general + "1\n0 1 5\n",
                ", line 3: a count or index is \"0\", expected a whole number from 1 to 2; correct it; indices start at 1");
        refused(
                general + "1\n1 3 5\n",
                ", line 3: a count or index is \"3\", expected a whole number from 1 to 2; correct it; indices start at 1");
        refused(
                general + "2\n2 1 5\n2 1 6\n",
                ", line 4: the entry at row 2, column 1 is listed twice, expected every entry once; add duplicates up before writing");
        refused(
                general + "5\n1 1 1\n1 2 1\n2 1 1\n2 2 1\n1 1 1\n",
                ", line 2: the size line declares 5 entries, expected at most 4 for this shape and symmetry; list every entry once, of symmetric "
                        + "matrices the lower triangle only");
        refused(
                "%%MatrixMarket matrix coordinate real symmetric\n2 2 1\n1 2 5\n",
                ", line 3: the entry at row 1, column 2 is not in the stored triangle, expected row at least column; list the lower triangle only, "
                        + "or declare the matrix general");
        refused(
                "%%MatrixMarket matrix coordinate real skew-symmetric\n2 2 1\n2 2 5\n",
                ", line 3: the entry at row 2, column 2 is not in the stored triangle, expected row above column; list the lower triangle only, or "
                        + "declare the matrix general");
        refused(
                "%%MatrixMarket matrix coordinate real symmetric\n2 3 1\n1 1 5\n",
                ", line 2: the matrix is 2 x 3, expected a square matrix for this symmetry; correct the size line or the banner");
        refused(
                "%%MatrixMarket matrix coordinate complex hermitian\n2 2 1\n2 2 5 1e-9\n",
                ", line 3: the diagonal entry of row 2 has imaginary part 1.0E-9, expected 0 in a hermitian matrix; correct the entry, or declare the "
                        + "matrix general");
    }

    @Test
    void longLinesAndEmptyFilesAreRefused() {
        refused("", ": the file is empty, expected a line %%MatrixMarket; check that the file was written");
        refused(
                "%%MatrixMarket matrix array real general\n%" + "x".repeat(1024) + "\n1 1\n1\n",
                ", line 2: the line is longer than 1024 characters, expected at most 1024; check that this is a Matrix Market text file");
    }

    private void refused(String text, String message) {
        InvalidInputException e =
                assertThrows(InvalidInputException.class, () -> MatrixMarket.readOperator(file(text)));
        assertEquals("MatrixMarket.readOperator, " + dir.resolve("a.mtx") + message, e.getMessage());
    }

    @ParameterizedTest
    @CsvSource({
        "array real general,2147483647 2147483647",
        "array complex hermitian,2000000000 2000000000",
        "array real general,20000 20000",
        "coordinate real general,2147483647 2147483647 1",
        "coordinate real general,60000 60000 1",
        "coordinate pattern general,5000 5000 1",
        "coordinate real symmetric,3000 3000 4000000",
        "coordinate real general,2 2 9999999999",
    })
    void hugeDeclarationsAreRefusedBeforeMemoryIsTaken(String banner, String sizes) throws IOException {
        Path p = file("%%MatrixMarket matrix " + banner + "\n" + sizes + "\n1 1 1\n");
        long taken = AllocationMeter.bytes(
                () -> assertThrows(InvalidInputException.class, () -> MatrixMarket.readOperator(p)));
        // the buffer of 64 KiB, the line, the message and its stack trace; the smallest declaration stands for 72 MB
        assertTrue(taken < 1 << 20, taken + " bytes");
    }

    @Test
    void sparseMatricesUpToDimension4096AreBelieved() throws IOException {
        Operator a = read("%%MatrixMarket matrix coordinate real general", "4096 4096 1", "4096 1 2.5");
        assertEquals(2.5, a.re(4095, 0));
    }

    @Test
    void writtenTextIsAsSaid() throws IOException {
        Path p = dir.resolve("w.mtx");
        HermitianOperator h =
                HermitianOperator.of(new double[][] {{0.1, 1e-7}, {1e-7, 3}}, new double[][] {{0, -.25}, {.25, 0}});
        MatrixMarket.write(p, h);
        assertEquals(
                "%%MatrixMarket matrix array complex hermitian\n2 2\n0.1 0.0\n1E-7 0.25\n3.0 0.0\n",
                Files.readString(p));
        MatrixMarket.write(p, real(new double[] {0, 2}, new double[] {2, 0}), MatrixMarketLayout.COORDINATE);
        assertEquals("%%MatrixMarket matrix coordinate real general\n2 2 2\n2 1 2.0\n1 2 2.0\n", Files.readString(p));
        MatrixMarket.write(p, HermitianOperator.diagonal(1, 0), MatrixMarketLayout.COORDINATE);
        assertEquals("%%MatrixMarket matrix coordinate real symmetric\n2 2 1\n1 1 1.0\n", Files.readString(p));
    }

    @ParameterizedTest
    @EnumSource(MatrixMarketLayout.class)
    void whatIsWrittenReadsBackToTheSameBits(MatrixMarketLayout layout) throws IOException {
        Random random = new Random(5);
        Path p = dir.resolve("w.mtx");
        for (int trial = 0; trial < 200; trial++) {
            int rows = 1 + random.nextInt(5);
            int columns = 1 + random.nextInt(5);
            Operator a = anyBits(rows, columns, trial % 2 == 0, random);
            MatrixMarket.write(p, a, layout);
            assertEquals(a, MatrixMarket.readOperator(p));
            HermitianOperator h = hermitianBits(rows, trial % 2 == 0, random);
            MatrixMarket.write(p, h, layout);
            assertEquals(h, MatrixMarket.readHermitianOperator(p));
            assertTrue(Files.readString(p).contains(h.isReal() ? "symmetric" : "hermitian"));
        }
    }

    /** Finite doubles of any exponent, a fifth of them zero. */
    static double anyBits(Random random) {
        double x;
        do {
            x = random.nextInt(5) == 0
                    ? (random.nextBoolean() ? 0.0 : -0.0)
                    : Double.longBitsToDouble(random.nextLong());
        } while (!Double.isFinite(x));
        return x;
    }

    static Operator anyBits(int rows, int columns, boolean real, Random random) {
        double[] re = random.doubles(rows * columns).map(x -> anyBits(random)).toArray();
        double[] im = real
                ? new double[0]
                : random.doubles(rows * columns).map(x -> anyBits(random)).toArray();
        return Operator.ofRowMajor(rows, columns, re, im);
    }

    static HermitianOperator hermitianBits(int n, boolean real, Random random) {
        double[][] re = new double[n][n];
        double[][] im = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                re[i][j] = anyBits(random);
                re[j][i] = re[i][j];
                im[i][j] = real || i == j ? 0 : anyBits(random);
                im[j][i] = -im[i][j];
            }
        }
        return HermitianOperator.of(re, im);
    }

    @Test
    void everyTypeIsReadAndChecked() throws IOException {
        Path p = dir.resolve("rho.mtx");
        DensityOperator rho = DensityOperator.ofBloch(0.6, 0.1, 0.5);
        MatrixMarket.write(p, rho);
        assertEquals(rho, MatrixMarket.readDensityOperator(p));
        assertEquals(rho, MatrixMarket.readPositiveOperator(p));
        assertEquals(rho, MatrixMarket.readHermitianOperator(p));
        assertEquals(rho, MatrixMarket.readOperator(p));

        MatrixMarket.write(p, HermitianOperator.diagonal(0.5, 0.4));
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> MatrixMarket.readDensityOperator(p));
        assertTrue(e.getMessage().startsWith("MatrixMarket.readDensityOperator, " + p + ": the trace is 0.9"));
        MatrixMarket.write(p, HermitianOperator.diagonal(1.5, -0.5));
        assertThrows(InvalidInputException.class, () -> MatrixMarket.readPositiveOperator(p));
        MatrixMarket.write(p, real(new double[] {0, 1}, new double[] {0, 0}));
        e = assertThrows(InvalidInputException.class, () -> MatrixMarket.readHermitianOperator(p));
        assertTrue(e.getMessage()
                .startsWith("MatrixMarket.readHermitianOperator, " + p + ": the operator is not Hermitian"));
        MatrixMarket.write(p, real(new double[] {0, 1}));
        assertThrows(InvalidInputException.class, () -> MatrixMarket.readDensityOperator(p));
    }

    @Test
    void aColumnIsAKet() throws IOException {
        DensityOperator psi = MatrixMarket.readDensityOperator(
                file("%%MatrixMarket matrix array complex general\n2 1\n0.6 0\n0 0.8\n"));
        assertEquals(DensityOperator.ofKet(new double[] {.6, 0}, new double[] {0, .8}), psi);
        assertEquals(1, psi.factor().rank());
        assertEquals(
                DensityOperator.ofKet(.6, -.8),
                MatrixMarket.readDensityOperator(file("%%MatrixMarket matrix array real general\n2 1\n0.6\n-0.8\n")));
        assertThrows(
                InvalidInputException.class,
                () -> MatrixMarket.readDensityOperator(
                        file("%%MatrixMarket matrix array real general\n2 1\n0.6\n0.7\n")));
        assertEquals(
                1,
                MatrixMarket.readDensityOperator(file("%%MatrixMarket matrix array real general\n1 1\n1\n"))
                        .dimension());
    }

    @Test
    void failuresOfTheFileSystemStayWhatTheyAre() {
        assertThrows(NoSuchFileException.class, () -> MatrixMarket.readOperator(dir.resolve("none.mtx")));
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> MatrixMarket.readOperator(dir));
        assertEquals(
                "MatrixMarket.readOperator, " + dir
                        + ": the path is not a regular file, expected a file on disk; copy the data to a file first",
                e.getMessage());
        assertThrows(
                IOException.class,
                () -> MatrixMarket.write(dir.resolve("no/such/dir.mtx"), HermitianOperator.identity(1)));
    }

    private static final String[] VALID = {
        "%%MatrixMarket matrix array complex hermitian\n% c\n3 3\n0.5 0\n1e-3 -.25\n0 0\n0.25 0\n0.0 0.125\n0.25 0.0\n",
        "%%MatrixMarket matrix coordinate real symmetric\n3 3 4\n1 1 .5\n2 2 .25\n3 3 +2.5E-1\n3 1 0.1\n",
        "%%MatrixMarket matrix coordinate pattern general\n2 2 2\n1 1\n2 2\n",
        "%%MatrixMarket matrix array integer skew-symmetric\n3 3\n1\n-2\n3\n",
    };

    @Test
    void aFileCutAnywhereIsReadOrRefused() {
        int read = 0;
        int total = 0;
        for (String text : VALID) {
            byte[] bytes = text.getBytes(java.nio.charset.StandardCharsets.ISO_8859_1);
            for (int length = 0; length < bytes.length; length++) {
                total++;
                read += isRead(java.util.Arrays.copyOf(bytes, length)) ? 1 : 0;
            }
            assertTrue(isRead(bytes));
        }
        // only cuts inside the last number, or of the last line feed, leave a valid file
        assertTrue(read >= VALID.length && read <= 6 * VALID.length, read + " of " + total);
    }

    @Test
    void aFileWithAnyByteChangedIsReadOrRefused() {
        for (String text : VALID) {
            byte[] bytes = text.getBytes(java.nio.charset.StandardCharsets.ISO_8859_1);
            for (int at = 0; at < bytes.length; at++) {
                byte old = bytes[at];
                for (int change : new int[] {1, 4, 16, 128, old ^ '9', old ^ '\n', old ^ '-'}) {
                    bytes[at] = (byte) (old ^ change);
                    isRead(bytes);
                }
                bytes[at] = old;
            }
        }
    }

    @Test
    void binaryJunkIsRefused() {
        Random random = new Random(11);
        byte[] banner =
                "%%MatrixMarket matrix array real general\n".getBytes(java.nio.charset.StandardCharsets.US_ASCII);
        for (int trial = 0; trial < 300; trial++) {
            byte[] junk = new byte[1 + random.nextInt(3000)];
            random.nextBytes(junk);
            assertFalse(isRead(junk));
            byte[] behind = java.util.Arrays.copyOf(banner, banner.length + junk.length);
            System.arraycopy(junk, 0, behind, banner.length, junk.length);
            assertFalse(isRead(behind));
        }
    }

    /** Whether the bytes are an operator; anything but a clean refusal fails the test. Also tried as a state. */
    private static boolean isRead(byte[] bytes) {
        RawMatrix m;
        try {
            m = MatrixMarketParser.parse(new ByteArrayInputStream(bytes), bytes.length, new FileSource("file"));
        } catch (InvalidInputException e) {
            assertTrue(e.getMessage().matches("(?s)file(, line \\d+)?: .*"), e.getMessage());
            return false;
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        Operator a = new Operator(m.rows(), m.columns(), m.re(), m.im());
        try {
            DensityOperator.of(a);
        } catch (InvalidInputException e) {
            assertTrue(e.getMessage().startsWith("DensityOperator.of: "), e.getMessage());
        }
        return true;
    }
}
