package org.minorant.core.internal.file;

import java.io.IOException;
import java.io.InputStream;
import java.util.BitSet;
import java.util.regex.Pattern;
import org.minorant.core.InvalidInputException;
import org.minorant.core.MatrixMarketLayout;
import org.minorant.core.internal.file.MatrixMarketHeader.Field;
import org.minorant.core.internal.file.MatrixMarketHeader.Symmetry;

/**
 * Reads a Matrix Market file, once, line by line.
 *
 * <p>Source of the format: R. F. Boisvert, R. Pozo, K. A. Remington, The Matrix Market exchange formats: initial design, NISTIR 5935 (1996),
 * from memory.
 */
public final class MatrixMarketParser {

    /**
     * A coordinate file can declare a matrix far larger than itself. Up to this many entries (dimension 4096) it is believed; beyond, the
     * entries listed must make up an eighth of the matrix.
     */
    private static final long SPARSE_ENTRIES = 1L << 24;

    private static final long LEAST_FILL = 8;

    private static final Pattern BLANKS = Pattern.compile("[ \t]+");

    /** Digits of the largest count that can matter. */
    private static final int COUNT_DIGITS = 10;

    /** A sign and the digits of 2^53 with room to spare. */
    private static final int WHOLE_DIGITS = 18;

    private final LineReader lines;
    private final long size;
    private final FileSource source;
    private final MatrixMarketHeader header;
    private final int rows;
    private final int columns;
    private final long entries;
    private final double[] re;
    private final double[] im;

    private MatrixMarketParser(InputStream in, long size, FileSource source) throws IOException {
        this.lines = new LineReader(in, source);
        this.size = size;
        this.source = source;
        if (lines.isAtEnd()) {
            throw source.refusal("the file is empty", "a line %%MatrixMarket", "check that the file was written");
        }
        this.header = MatrixMarketHeader.parse(lines.nextLine(), source);
        long[] counts = sizes();
        long most = FileSource.entriesThatFit();
        if (counts[0] * counts[1] > most) {
            throw here(
                    "the matrix is " + counts[0] + " x " + counts[1],
                    "at most " + most + " entries in this heap",
                    "raise the heap (-Xmx) or store a smaller matrix");
        }
        this.rows = (int) counts[0];
        this.columns = (int) counts[1];
        this.entries = header.layout() == MatrixMarketLayout.ARRAY ? listed() : counts[2];
        checkEntries();
        this.re = new double[rows * columns];
        this.im = header.field() == Field.COMPLEX ? new double[rows * columns] : new double[0];
    }

    /** Parses a stream of a known size. */
    public static RawMatrix parse(InputStream in, long size, FileSource source) throws IOException {
        MatrixMarketParser p = new MatrixMarketParser(in, size, source);
        if (p.header.layout() == MatrixMarketLayout.ARRAY) {
            p.array();
        } else {
            p.coordinates();
        }
        p.end();
        return new RawMatrix(p.rows, p.columns, p.re, p.im);
    }

    private InvalidInputException here(String found, String limit, String cure) {
        return source.atLine(lines.number(), found, limit, cure);
    }

    /** The first line that is neither a comment nor blank: two or three counts. */
    private long[] sizes() throws IOException {
        String[] words;
        do {
            words = words("the size line");
        } while (words[0].startsWith("%"));
        int expected = header.layout() == MatrixMarketLayout.ARRAY ? 2 : 3;
        if (words.length != expected) {
            throw here(
                    "the size line has " + words.length + " words",
                    expected + " whole numbers",
                    "give rows and columns, and for coordinate files the number of entries");
        }
        long[] counts = new long[expected];
        for (int i = 0; i < expected; i++) {
            counts[i] = count(words[i], i < 2 ? 1 : 0, i < 2 ? Integer.MAX_VALUE : Long.MAX_VALUE);
        }
        if (header.isTriangular() && counts[0] != counts[1]) {
            throw here(
                    "the matrix is " + counts[0] + " x " + counts[1],
                    "a square matrix for this symmetry",
                    "correct the size line or the banner");
        }
        return counts;
    }

    private long count(String word, long least, long most) {
        boolean whole = Decimal.isWhole(word) && word.length() <= COUNT_DIGITS;
        long n = whole ? Long.parseLong(word) : -1;
        if (!whole || n < least || n > most) {
            throw here(
                    "a count or index is " + Quoted.of(word),
                    "a whole number from " + least + " to " + Math.min(most, 9_999_999_999L),
                    "correct it; indices start at 1");
        }
        return n;
    }

    /** How many entries the symmetry leaves to be listed. */
    private long listed() {
        long n = rows;
        return switch (header.symmetry()) {
            case GENERAL -> n * columns;
            case SYMMETRIC, HERMITIAN -> n * (n + 1) / 2;
            case SKEW_SYMMETRIC -> n * (n - 1) / 2;
        };
    }

    /** Compares the declared number of entries with the shape and with the bytes that are left; nothing is allocated before. */
    private void checkEntries() {
        long possible = listed();
        if (entries > possible) {
            throw here(
                    "the size line declares " + entries + " entries",
                    "at most " + possible + " for this shape and symmetry",
                    "list every entry once, of symmetric matrices the lower triangle only");
        }
        boolean coordinate = header.layout() == MatrixMarketLayout.COORDINATE;
        // the shortest entry: one digit and one separator for each word
        int shortest = 2 * (header.field().words() + (coordinate ? 2 : 0));
        long left = size - lines.consumed();
        if (entries > 0 && entries * shortest - 1 > left) {
            throw here(
                    "the size line declares " + entries + " entries",
                    "at most " + (left + 1) / shortest + ", for " + left + " bytes follow",
                    "the file is truncated or the counts are wrong");
        }
        long all = (long) rows * columns;
        if (coordinate && all > Math.max(SPARSE_ENTRIES, LEAST_FILL * entries)) {
            throw here(
                    "the matrix is " + rows + " x " + columns + " with " + entries + " entries listed",
                    "at most " + SPARSE_ENTRIES + " entries in all unless an eighth of them is listed",
                    "use the array layout: operators are dense here");
        }
    }

    /** The words of the next line that is not blank. */
    private String[] words(String expected) throws IOException {
        while (!lines.isAtEnd()) {
            String line = lines.nextLine();
            int start = 0;
            while (start < line.length() && isBlank(line.charAt(start))) {
                start++;
            }
            if (start < line.length()) {
                return BLANKS.split(line.substring(start));
            }
        }
        throw here("the file ends here", expected, "the file is truncated or the counts are wrong");
    }

    private static boolean isBlank(char c) {
        return c == ' ' || c == '\t';
    }

    private String[] entry(long index) throws IOException {
        int expected = header.field().words() + (header.layout() == MatrixMarketLayout.COORDINATE ? 2 : 0);
        String[] words = words("entry " + (index + 1) + " of " + entries);
        if (words.length != expected) {
            throw here(
                    "entry " + (index + 1) + " has " + words.length + " words",
                    expected + ", for the banner is " + header.text(),
                    "write one entry on each line");
        }
        return words;
    }

    private void array() throws IOException {
        long index = 0;
        for (int j = 0; j < columns; j++) {
            int first = header.isTriangular() ? j + (header.symmetry() == Symmetry.SKEW_SYMMETRIC ? 1 : 0) : 0;
            for (int i = first; i < rows; i++) {
                store(i, j, entry(index++), 0);
            }
        }
    }

    private void coordinates() throws IOException {
        BitSet seen = new BitSet();
        for (long index = 0; index < entries; index++) {
            String[] words = entry(index);
            int i = (int) count(words[0], 1, rows) - 1;
            int j = (int) count(words[1], 1, columns) - 1;
            boolean strict = header.symmetry() == Symmetry.SKEW_SYMMETRIC;
            if (header.isTriangular() && (i < j || strict && i == j)) {
                throw here(
                        "the entry at row " + (i + 1) + ", column " + (j + 1) + " is not in the stored triangle",
                        strict ? "row above column" : "row at least column",
                        "list the lower triangle only, or declare the matrix general");
            }
            if (seen.get(i * columns + j)) {
                throw here(
                        "the entry at row " + (i + 1) + ", column " + (j + 1) + " is listed twice",
                        "every entry once",
                        "add duplicates up before writing");
            }
            seen.set(i * columns + j);
            store(i, j, words, 2);
        }
    }

    private void store(int i, int j, String[] words, int first) {
        double x = header.field() == Field.PATTERN ? 1 : number(words[first]);
        re[i * columns + j] = x;
        boolean mirror = header.isTriangular() && i != j;
        if (mirror) {
            re[j * columns + i] = header.symmetry() == Symmetry.SKEW_SYMMETRIC ? -x : x;
        }
        if (im.length != 0) {
            double y = number(words[first + 1]);
            if (header.symmetry() == Symmetry.HERMITIAN && i == j && y != 0) {
                throw here(
                        "the diagonal entry of row " + (i + 1) + " has imaginary part " + y,
                        "0 in a hermitian matrix",
                        "correct the entry, or declare the matrix general");
            }
            im[i * columns + j] = y;
            if (mirror) {
                im[j * columns + i] = header.symmetry() == Symmetry.SYMMETRIC ? y : -y;
            }
        }
    }

    private double number(String word) {
        boolean whole = header.field() == Field.INTEGER;
        double x = Double.NaN;
        if (whole && Decimal.isWhole(word) && word.length() <= WHOLE_DIGITS) {
            long n = Long.parseLong(word);
            x = Math.abs(n) <= 1L << 53 ? n : Double.NaN;
        } else if (!whole && Decimal.isNumber(word)) {
            x = Double.parseDouble(word);
        }
        if (!Double.isFinite(x)) {
            throw here(
                    "a value is " + Quoted.of(word),
                    whole ? "a whole number of at most 2^53 in magnitude" : "a finite decimal number such as -1.5e-3",
                    "correct the entry");
        }
        return x;
    }

    /** Nothing but blank lines may follow the last entry. */
    private void end() throws IOException {
        while (!lines.isAtEnd()) {
            String line = lines.nextLine();
            if (!line.chars().allMatch(c -> isBlank((char) c))) {
                throw here(
                        "after the last of " + entries + " entries comes " + Quoted.of(line),
                        "the end of the file",
                        "correct the counts on the size line");
            }
        }
    }
}
