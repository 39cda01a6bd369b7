package org.minorant.core;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Base64;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.internal.file.FileSource;
import org.minorant.core.internal.file.NpyFormat;
import org.minorant.core.internal.file.RawMatrix;

class NumpyFileTest {

    @TempDir
    Path dir;

    /** A file put together byte by byte as NEP 1 says, independently of the writer. */
    private static byte[] file(int version, String header, ByteOrder order, double... numbers) {
        int before = version == 1 ? 10 : 12;
        int total = (before + header.length() + 1 + 63) / 64 * 64;
        String padded = header + " ".repeat(total - before - header.length() - 1) + "\n";
        ByteBuffer b = ByteBuffer.allocate(total + 8 * numbers.length).order(ByteOrder.LITTLE_ENDIAN);
        b.put((byte) 0x93)
                .put("NUMPY".getBytes(StandardCharsets.US_ASCII))
                .put((byte) version)
                .put((byte) 0);
        if (version == 1) {
            b.putShort((short) padded.length());
        } else {
            b.putInt(padded.length());
        }
        b.put(padded.getBytes(StandardCharsets.ISO_8859_1)).order(order);
        for (double x : numbers) {
            b.putDouble(x);
        }
        return b.array();
    }

    private static byte[] file(String header, double... numbers) {
        return file(1, header, ByteOrder.LITTLE_ENDIAN, numbers);
    }

    private static String header(String descr, boolean columnMajor, String shape) {
        return "{'descr': '" + descr + "', 'fortran_order': " + (columnMajor ? "True" : "False") + ", 'shape': " + shape
                + ", }";
    }

    private Path write(byte[] bytes) throws IOException {
        return Files.write(dir.resolve("a.npy"), bytes);
    }

    private Operator read(byte[] bytes) throws IOException {
        return NumpyFile.readOperator(write(bytes));
    }

    private static final Operator SIX = Operator.ofReal(new double[][] {{1, 2, 3}, {4, 5, 6}});

    @ParameterizedTest
    @ValueSource(ints = {1, 2, 3})
    void everyVersionByteOrderAndMemoryOrderIsRead(int version) throws IOException {
        ByteOrder little = ByteOrder.LITTLE_ENDIAN;
        ByteOrder big = ByteOrder.BIG_ENDIAN;
        assertEquals(SIX, read(file(version, header("<f8", false, "(2, 3)"), little, 1, 2, 3, 4, 5, 6)));
        assertEquals(SIX, read(file(version, header("<f8", true, "(2, 3)"), little, 1, 4, 2, 5, 3, 6)));
        assertEquals(SIX, read(file(version, header(">f8", false, "(2, 3)"), big, 1, 2, 3, 4, 5, 6)));
        Operator c = Operator.of(new double[][] {{1, 2}, {3, 4}}, new double[][] {{-1, 0}, {5, 1e-300}});
        assertEquals(c, read(file(version, header("<c16", false, "(2, 2)"), little, 1, -1, 2, 0, 3, 5, 4, 1e-300)));
        assertEquals(c, read(file(version, header("<c16", true, "(2, 2)"), little, 1, -1, 3, 5, 2, 0, 4, 1e-300)));
        assertEquals(c, read(file(version, header(">c16", true, "(2, 2)"), big, 1, -1, 3, 5, 2, 0, 4, 1e-300)));
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "{\"shape\":(2,3,),\"fortran_order\":False,\"descr\":\"<f8\"}",
                "{ 'fortran_order' : False , 'descr' : '<f8' , 'shape' : ( 2 , 3 ) , } ",
                "  {'descr':'<f8','fortran_order':False,'shape':(02,3)}",
            })
    void theDictionaryMayBeSpacedAndOrderedInAnyWay(String header) throws IOException {
        assertEquals(SIX, read(file(header, 1, 2, 3, 4, 5, 6)));
    }

    /** Files written by NumPy 2.4.6 itself: save of a Fortran-ordered array, and write_array with version (3, 0). */
    @Test
    void filesWrittenByNumpyAreRead() throws IOException {
        Base64.Decoder decoder = Base64.getDecoder();
        assertEquals(
                Operator.of(new double[][] {{.5, .25}, {.25, .5}}, new double[][] {{0, -.125}, {.125, 0}}),
                read(decoder.decode(
                        "k05VTVBZAQB2AHsnZGVzY3InOiAnPGMxNicsICdmb3J0cmFuX29yZGVyJzogVHJ1ZSwgJ3NoYXBlJzogKDIsIDIpLCB9ICAgICAg"
                                + "ICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgIAoAAAAAAADgPwAAAAAAAAAAAAAAAAAA"
                                + "0D8AAAAAAADAPwAAAAAAANA/AAAAAAAAwL8AAAAAAADgPwAAAAAAAAAA")));
        assertEquals(
                Operator.ofReal(new double[][] {{.6}, {-.8}}),
                read(
                        decoder.decode(
                                "k05VTVBZAwB0AAAAeydkZXNjcic6ICc+ZjgnLCAnZm9ydHJhbl9vcmRlcic6IEZhbHNlLCAnc2hhcGUnOiAoMiwpLCB9ICAgICAg"
                                        + "ICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgICAgIAo/4zMzMzMzM7/pmZmZmZma")));
    }

    @Test
    void oneDimensionIsAColumnAndAKet() throws IOException {
        assertEquals(
                Operator.ofReal(new double[][] {{0.6}, {0.8}}), read(file(header("<f8", false, "(2,)"), 0.6, 0.8)));
        DensityOperator psi = NumpyFile.readDensityOperator(write(file(header("<c16", true, "(2,)"), 0.6, 0, 0, -0.8)));
        assertEquals(DensityOperator.ofKet(new double[] {.6, 0}, new double[] {0, -.8}), psi);
        assertEquals(1, psi.factor().rank());
        assertEquals(psi, NumpyFile.readDensityOperator(write(file(header("<c16", false, "(2, 1)"), 0.6, 0, 0, -0.8))));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "|10|the header ends here|the character {",
                "['descr']|10|the header has \"['descr']      |the character {",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (2, 3)|127|the header has \"?\"|the character }",
                "{'descr': '<f8', 'fortran_order': False}|50|the end of a dictionary that lacks a key|descr, fortran_order and shape, each once",
                "{'descr': '<f8', 'descr': '<f8', 'fortran_order': False, 'shape': (2, 3)}|27|the key \"descr\"|descr, fortran_order and shape, each "
                        + "once",
                "{'descr': '<f8', 'order': False, 'shape': (2, 3)}|27|the key \"order\"|descr, fortran_order and shape, each once",
                "{'descr': '<f4', 'fortran_order': False, 'shape': (2, 3)}|20|the type \"<f4\"|<f8, >f8, <c16 or >c16: float64 or complex128",
                "{'descr': 'O', 'fortran_order': False, 'shape': (2, 3)}|20|the type \"O\"|<f8, >f8, <c16 or >c16: float64 or complex128",
                "{'descr': [('x', '<f8')], 'fortran_order': False, 'shape': (2, 3)}|20|the header has \"[('x', '<f8')]|a string in quotes",
                "{'descr: <f8, fortran_order: False, shape: (2, 3)}|11|the header has \"'descr: <f8|a string in quotes",
                "{'descr': '<f8', 'fortran_order': false, 'shape': (2, 3)}|44|the header has \"false|True or False",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (-2, 3)}|61|the header has \"-2|a dimension from 1 to 2147483647",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (0, 3)}|61|the header has \"0|a dimension from 1 to 2147483647",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (2147483648, 3)}|61|the header has \"2147|a dimension from 1 to 2147483647",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (99999999999999999999999, 3)}|61|the header has \"9999|a dimension from 1 to "
                        + "2147483647",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (2L, 3)}|62|the header has \"L|a comma or )",
                "{'descr': '<f8', 'fortran_order': False, 'shape': ()}|60|a shape of 0 dimensions|(d,) for a ket or (rows, columns)",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (6)}|60|a shape of 1 dimensions|(d,) for a ket or (rows, columns)",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (1, 2, 3)}|60|a shape of 3 dimensions|(d,) for a ket or (rows, columns)",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (2, 3), 'x': 1}|68|the key \"x\"|descr, fortran_order and shape, each once",
                "{'descr': '<f8', 'fortran_order': False, 'shape': (2, 3)} exit()|68|the header has \"exit()|spaces up to a line feed that ends "
                        + "the header",
                "{'descr': '<f8', 'fortran_order': False 'shape': (2, 3)}|50|the header has \"'shape'|the character }",
            })
    void badHeadersAreRefusedWithTheByte(String header, long at, String found, String limit) throws IOException {
        byte[] bytes = file(header == null ? "" : header, 1, 2, 3, 4, 5, 6);
        if (header == null) {
            bytes[8] = 0;
        }
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> read(bytes));
        assertEquals("NumpyFile.readOperator, " + dir.resolve("a.npy") + ", byte " + at, e.asked());
        assertTrue(e.found().startsWith(found), e.found());
        assertEquals(limit, e.limit());
    }

    @Test
    void aHeaderWithoutLineFeedIsRefused() throws IOException {
        byte[] bytes = file(header("<f8", false, "(1, 1)"), 1);
        bytes[127] = ' ';
        refused(
                bytes,
                ", byte 128: the header ends here, expected spaces up to a line feed that ends the header; write the array again as complex128 or "
                        + "float64");
    }

    @Test
    void textAfterALineFeedInTheHeaderIsRefused() throws IOException {
        byte[] bytes = file(header("<f8", false, "(1, 1)"), 1);
        bytes[100] = '\n';
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> read(bytes));
        assertEquals("spaces up to a line feed that ends the header", e.limit());
        assertTrue(e.asked().endsWith("byte 100"), e.asked());
    }

    @Test
    void wrongMagicVersionAndLengthsAreRefused() throws IOException {
        byte[] good = file(header("<f8", false, "(1, 1)"), 1);
        refused(with(good, 0, 'N'), ", byte 0: the byte is 0x4e, expected 0x93 NUMPY; check that this is a .npy file");
        refused(with(good, 5, 'y'), ", byte 5: the byte is 0x79, expected 0x93 NUMPY; check that this is a .npy file");
        refused(with(good, 6, 4), ", byte 6: the version is 4.0, expected 1.0, 2.0 or 3.0; write the array again");
        refused(with(good, 7, 1), ", byte 6: the version is 1.1, expected 1.0, 2.0 or 3.0; write the array again");
        refused(
                with(good, 9, 1),
                ", byte 8: the header is declared 374 bytes long, expected at most 126; the file is truncated or not a .npy file");
        byte[] two = file(2, header("<f8", false, "(1, 1)"), ByteOrder.LITTLE_ENDIAN, 1);
        refused(
                with(two, 11, 0xff),
                ", byte 8: the header is declared 4278190196 bytes long, expected at most 124; the file is truncated or not a .npy file");
        refused(
                Arrays.copyOf(good, 5),
                ", byte 5: the file ends here, expected 3 more bytes of the magic and the version; the file is truncated or not a .npy file");
        refused(
                Arrays.copyOf(good, good.length - 1),
                ", byte 128: the shape 1 x 1 declares 1 entries of 8 bytes, and 7 bytes follow, expected exactly the bytes declared; the file is "
                        + "truncated, or something was appended to it");
        refused(
                Arrays.copyOf(good, good.length + 8),
                ", byte 128: the shape 1 x 1 declares 1 entries of 8 bytes, and 16 bytes follow, expected exactly the bytes declared; the file is "
                        + "truncated, or something was appended to it");
    }

    @Test
    void numbersThatAreNotFiniteAreRefusedWithTheirByte() throws IOException {
        refused(
                file(header("<f8", false, "(1, 2)"), 1, Double.NaN),
                ", byte 136: the number is NaN, expected a finite number; check the computation that made it");
        refused(
                file(header("<c16", true, "(1, 1)"), Double.NEGATIVE_INFINITY, 0),
                ", byte 128: the number is -Infinity, expected a finite number; check the computation that made it");
        double[] many = new double[10_000];
        many[9_999] = Double.POSITIVE_INFINITY;
        refused(
                file(header("<f8", false, "(100, 100)"), many),
                ", byte " + (128 + 8 * 9_999)
                        + ": the number is Infinity, expected a finite number; check the computation that made it");
    }

    private static byte[] with(byte[] bytes, int at, int value) {
        byte[] b = bytes.clone();
        b[at] = (byte) value;
        return b;
    }

    private void refused(byte[] bytes, String message) throws IOException {
        Path p = write(bytes);
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> NumpyFile.readOperator(p));
        assertEquals("NumpyFile.readOperator, " + p + message, e.getMessage());
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "(3000, 3000)",
                "(20000, 20000)",
                "(2147483647, 2147483647)",
                "(2147483647,)",
                "(65536, 65536)",
                "(4294967296, 1)"
            })
    void hugeDeclarationsAreRefusedBeforeMemoryIsTaken(String shape) throws IOException {
        for (String descr : new String[] {"<f8", "<c16"}) {
            Path p = write(file(header(descr, false, shape), 1, 2));
            long taken = AllocationMeter.bytes(
                    () -> assertThrows(InvalidInputException.class, () -> NumpyFile.readOperator(p)));
            assertTrue(taken < 1 << 20, taken + " bytes");
        }
    }

    @Test
    void aHugeHeaderIsRefusedBeforeMemoryIsTaken() throws IOException {
        byte[] big = new byte[1 << 20];
        byte[] start = file(3, header("<f8", false, "(1, 1)"), ByteOrder.LITTLE_ENDIAN, 1);
        System.arraycopy(start, 0, big, 0, start.length);
        big[10] = 8;
        Path p = write(big);
        long taken = AllocationMeter.bytes(() -> {
            InvalidInputException e = assertThrows(InvalidInputException.class, () -> NumpyFile.readOperator(p));
            assertEquals("at most 65536", e.limit());
        });
        assertTrue(taken < 1 << 18, taken + " bytes");
    }

    @Test
    void whatIsWrittenReadsBackToTheSameBits() throws IOException {
        Random random = new Random(6);
        Path p = dir.resolve("w.npy");
        for (int trial = 0; trial < 200; trial++) {
            Operator a = MatrixMarketTest.anyBits(1 + random.nextInt(5), 1 + random.nextInt(5), trial % 2 == 0, random);
            NumpyFile.write(p, a);
            assertEquals(a, NumpyFile.readOperator(p));
            HermitianOperator h = MatrixMarketTest.hermitianBits(1 + random.nextInt(5), trial % 2 == 0, random);
            NumpyFile.write(p, h);
            assertEquals(h, NumpyFile.readHermitianOperator(p));
        }
        Operator large = MatrixMarketTest.anyBits(97, 91, false, random);
        NumpyFile.write(p, large);
        assertEquals(large, NumpyFile.readOperator(p));
    }

    @Test
    void writtenBytesAreAsSaid() throws IOException {
        Path p = dir.resolve("w.npy");
        NumpyFile.write(p, SIX);
        assertArrayEquals(file(header("<f8", false, "(2, 3)"), 1, 2, 3, 4, 5, 6), Files.readAllBytes(p));
        NumpyFile.write(p, Operator.of(new double[][] {{1}}, new double[][] {{2}}));
        assertArrayEquals(file(header("<c16", false, "(1, 1)"), 1, 2), Files.readAllBytes(p));
    }

    @Test
    void everyTypeIsReadAndChecked() throws IOException {
        Path p = dir.resolve("rho.npy");
        DensityOperator rho = DensityOperator.ofBloch(0.6, 0.1, 0.5);
        NumpyFile.write(p, rho);
        assertEquals(rho, NumpyFile.readDensityOperator(p));
        assertEquals(rho, NumpyFile.readPositiveOperator(p));
        NumpyFile.write(p, HermitianOperator.diagonal(0.5, 0.4));
        InvalidInputException e = assertThrows(InvalidInputException.class, () -> NumpyFile.readDensityOperator(p));
        assertTrue(e.getMessage().startsWith("NumpyFile.readDensityOperator, " + p + ": the trace is 0.9"));
        assertThrows(NoSuchFileException.class, () -> NumpyFile.readOperator(dir.resolve("none.npy")));
        assertThrows(InvalidInputException.class, () -> NumpyFile.readOperator(dir));
        assertThrows(IOException.class, () -> NumpyFile.write(dir.resolve("no/such/dir.npy"), rho));
    }

    @Test
    void aFileCutAnywhereIsRefused() {
        for (byte[] valid : valid()) {
            assertTrue(isRead(valid));
            for (int length = 0; length < valid.length; length++) {
                assertFalse(isRead(Arrays.copyOf(valid, length)), "cut at " + length);
            }
        }
    }

    @Test
    void aFileWithAnyByteChangedIsReadOrRefused() {
        for (byte[] valid : valid()) {
            for (int at = 0; at < valid.length; at++) {
                byte old = valid[at];
                for (int change : new int[] {1, 4, 16, 128, old ^ '9', old ^ ' ', old ^ '('}) {
                    valid[at] = (byte) (old ^ change);
                    isRead(valid);
                }
                valid[at] = old;
            }
        }
    }

    private static byte[][] valid() {
        return new byte[][] {
            file(header("<f8", false, "(2, 2)"), .75, .25, .25, .25),
            file(3, header(">c16", true, "(2, 2)"), ByteOrder.BIG_ENDIAN, .5, 0, .25, .25, .25, -.25, .5, 0),
            file(header("<c16", false, "(2,)"), .6, 0, 0, .8),
        };
    }

    @Test
    void binaryJunkIsRefused() {
        Random random = new Random(12);
        byte[] start = file(header("<f8", false, "(1, 1)"));
        for (int trial = 0; trial < 300; trial++) {
            byte[] junk = new byte[1 + random.nextInt(3000)];
            random.nextBytes(junk);
            assertFalse(isRead(junk));
            System.arraycopy(start, 0, junk, 0, Math.min(10, junk.length));
            assertFalse(isRead(junk));
        }
    }

    /** Whether the bytes are an operator; anything but a clean refusal fails the test. Also tried as a state. */
    private static boolean isRead(byte[] bytes) {
        RawMatrix m;
        try {
            m = NpyFormat.parse(new ByteArrayInputStream(bytes), bytes.length, new FileSource("file"));
        } catch (InvalidInputException e) {
            assertTrue(e.getMessage().matches("(?s)file, byte \\d+: .*"), e.getMessage());
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
