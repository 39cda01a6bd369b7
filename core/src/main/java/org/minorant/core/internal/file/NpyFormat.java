package org.minorant.core.internal.file;

import java.io.IOException;
import java.io.InputStream;
import java.io.OutputStream;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.charset.StandardCharsets;
import org.minorant.core.Operator;

/**
 * The {@code .npy} format, both ways: six bytes of magic, two of version, the length of the header, the header, the numbers.
 *
 * <p>Source of the format: R. Kern, A simple file format for NumPy arrays, NEP 1 (2007), and the versions 2 and 3 in its later text, from
 * memory.
 */
public final class NpyFormat {

    /** The byte 0x93 and NUMPY. */
    private static final byte[] MAGIC = {(byte) 0x93, 'N', 'U', 'M', 'P', 'Y'};

    /** The header of a matrix takes about 80 bytes; versions 2 and 3 could declare 4 GiB. */
    private static final int LONGEST_HEADER = 1 << 16;

    /** The numbers start at a multiple of this. */
    private static final int ALIGNMENT = 64;

    private static final int CHUNK = 1 << 16;

    private NpyFormat() {}

    /** Parses a stream of a known size. */
    public static RawMatrix parse(InputStream in, long size, FileSource source) throws IOException {
        byte[] start = bytes(in, 0, 8, "the magic and the version", source);
        for (int i = 0; i < MAGIC.length; i++) {
            if (start[i] != MAGIC[i]) {
                throw source.atByte(
                        i, "the byte is 0x" + hex(start[i]), "0x93 NUMPY", "check that this is a .npy file");
            }
        }
        if (start[6] < 1 || start[6] > 3 || start[7] != 0) {
            throw source.atByte(
                    6,
                    "the version is " + (start[6] & 0xff) + "." + (start[7] & 0xff),
                    "1.0, 2.0 or 3.0",
                    "write the array again");
        }
        int lengthBytes = start[6] == 1 ? 2 : 4;
        long length = unsigned(bytes(in, 8, lengthBytes, "the length of the header", source));
        long headerAt = 8 + lengthBytes;
        if (length > LONGEST_HEADER || length > size - headerAt) {
            throw source.atByte(
                    8,
                    "the header is declared " + length + " bytes long",
                    "at most " + Math.max(0, Math.min(LONGEST_HEADER, size - headerAt)),
                    "the file is truncated or not a .npy file");
        }
        byte[] text = bytes(in, headerAt, (int) length, "the header", source);
        // every legal character is ASCII in all three versions; others fail to parse
        NpyHeader h = NpyHeader.parse(new String(text, StandardCharsets.ISO_8859_1), headerAt, source);
        long dataAt = headerAt + length;
        checkSize(h, dataAt, size, source);
        return numbers(in, h, dataAt, source);
    }

    private static void checkSize(NpyHeader h, long dataAt, long size, FileSource source) {
        long entries = h.rows() * h.columns();
        long left = size - dataAt;
        // compared as entries, because the product with the entry size could overflow
        if (left % h.entryBytes() != 0 || entries != left / h.entryBytes()) {
            throw source.atByte(
                    dataAt,
                    "the shape " + h.rows() + " x " + h.columns() + " declares " + entries + " entries of "
                            + h.entryBytes() + " bytes, and " + left + " bytes follow",
                    "exactly the bytes declared",
                    "the file is truncated, or something was appended to it");
        }
        long most = FileSource.entriesThatFit();
        if (entries > most) {
            throw source.atByte(
                    dataAt,
                    "the matrix is " + h.rows() + " x " + h.columns(),
                    "at most " + most + " entries in this heap",
                    "raise the heap (-Xmx) or store a smaller matrix");
        }
    }

    private static RawMatrix numbers(InputStream in, NpyHeader h, long dataAt, FileSource source) throws IOException {
        int rows = (int) h.rows();
        int columns = (int) h.columns();
        double[] re = new double[rows * columns];
        double[] im = h.complex() ? new double[rows * columns] : new double[0];
        int perChunk = CHUNK / h.entryBytes();
        for (int first = 0; first < re.length; first += perChunk) {
            int n = Math.min(perChunk, re.length - first);
            long at = dataAt + (long) first * h.entryBytes();
            ByteBuffer b = ByteBuffer.wrap(bytes(in, at, n * h.entryBytes(), "the numbers", source))
                    .order(h.order());
            for (int k = first; k < first + n; k++) {
                int target = h.columnMajor() ? k % rows * columns + k / rows : k;
                re[target] = number(b, at, source);
                if (im.length != 0) {
                    im[target] = number(b, at, source);
                }
            }
        }
        if (in.read() >= 0) {
            throw source.atByte(
                    dataAt + (long) re.length * h.entryBytes(),
                    "the file has grown while it was read",
                    "the end of the file",
                    "read it again when it is complete");
        }
        return new RawMatrix(rows, columns, re, im);
    }

    private static double number(ByteBuffer b, long chunkAt, FileSource source) {
        int position = b.position();
        double x = b.getDouble();
        if (!Double.isFinite(x)) {
            throw source.atByte(
                    chunkAt + position, "the number is " + x, "a finite number", "check the computation that made it");
        }
        return x;
    }

    private static long unsigned(byte[] littleEndian) {
        long n = 0;
        for (int i = littleEndian.length - 1; i >= 0; i--) {
            n = n << 8 | littleEndian[i] & 0xff;
        }
        return n;
    }

    private static String hex(byte b) {
        return Integer.toHexString(b & 0xff);
    }

    /** Reads exactly so many bytes. */
    private static byte[] bytes(InputStream in, long at, int count, String what, FileSource source) throws IOException {
        byte[] b = in.readNBytes(count);
        if (b.length < count) {
            throw source.atByte(
                    at + b.length,
                    "the file ends here",
                    (count - b.length) + " more bytes of " + what,
                    "the file is truncated or not a .npy file");
        }
        return b;
    }

    /** Writes an operator as version 1.0, row-major, little-endian: float64 if it is real, complex128 otherwise. */
    public static void write(OutputStream out, Operator a) throws IOException {
        String dictionary = NpyHeader.text(a.rows(), a.columns(), !a.isReal());
        int unpadded = MAGIC.length + 4 + dictionary.length() + 1;
        int padding = (ALIGNMENT - unpadded % ALIGNMENT) % ALIGNMENT;
        int length = dictionary.length() + padding + 1;
        out.write(MAGIC);
        out.write(new byte[] {1, 0, (byte) length, (byte) (length >> 8)});
        out.write((dictionary + " ".repeat(padding) + "\n").getBytes(StandardCharsets.US_ASCII));
        ByteBuffer b = ByteBuffer.allocate(CHUNK).order(ByteOrder.LITTLE_ENDIAN);
        for (int i = 0; i < a.rows(); i++) {
            for (int j = 0; j < a.columns(); j++) {
                b.putDouble(a.re(i, j));
                if (!a.isReal()) {
                    b.putDouble(a.im(i, j));
                }
                if (!b.hasRemaining()) {
                    out.write(b.array());
                    b.clear();
                }
            }
        }
        out.write(b.array(), 0, b.position());
    }
}
