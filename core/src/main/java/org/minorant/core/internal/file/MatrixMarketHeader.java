package org.minorant.core.internal.file;

import java.util.Locale;
import org.minorant.core.MatrixMarketLayout;

/**
 * The first line of a Matrix Market file: {@code %%MatrixMarket matrix layout field symmetry}, in any case.
 *
 * @param layout how entries are listed
 * @param field what an entry is
 * @param symmetry which entries are listed
 */
public record MatrixMarketHeader(MatrixMarketLayout layout, Field field, Symmetry symmetry) {

    /** What an entry is, and the number of words it takes. */
    public enum Field {
        /** One real number. */
        REAL(1),
        /** A real and an imaginary part. */
        COMPLEX(2),
        /** One whole number. */
        INTEGER(1),
        /** Nothing: the entry is one. */
        PATTERN(0);

        private final int words;

        Field(int words) {
            this.words = words;
        }

        int words() {
            return words;
        }
    }

    /** Which entries are listed, and what the others are. */
    public enum Symmetry {
        /** All. */
        GENERAL,
        /** The lower triangle; the upper one is equal. */
        SYMMETRIC,
        /** The lower triangle without the diagonal; the upper one is opposite. */
        SKEW_SYMMETRIC,
        /** The lower triangle; the upper one is conjugate. */
        HERMITIAN
    }

    private static final String BANNER = "%%matrixmarket";

    /** Parses the first line. */
    static MatrixMarketHeader parse(String line, FileSource source) {
        String[] words = line.toLowerCase(Locale.ROOT).split("[ \t]+");
        if (!words[0].equals(BANNER)) {
            throw source.atLine(
                    1,
                    "the file starts with " + Quoted.of(line),
                    "%%MatrixMarket",
                    "check that this is a Matrix Market file");
        }
        if (words.length != 5 || !words[1].equals("matrix")) {
            throw source.atLine(
                    1,
                    "the banner is " + Quoted.of(line),
                    "%%MatrixMarket matrix, then array or coordinate, a field and a symmetry",
                    "complete the banner");
        }
        MatrixMarketHeader h = new MatrixMarketHeader(
                word(MatrixMarketLayout.values(), words[2], "the layout", source),
                word(Field.values(), words[3], "the field", source),
                word(Symmetry.values(), words[4], "the symmetry", source));
        h.check(source);
        return h;
    }

    private static <E extends Enum<E>> E word(E[] values, String word, String what, FileSource source) {
        StringBuilder names = new StringBuilder();
        for (E v : values) {
            if (name(v).equals(word)) {
                return v;
            }
            names.append(names.length() == 0 ? "" : " or ").append(name(v));
        }
        throw source.atLine(1, what + " is " + Quoted.of(word), names.toString(), "correct the banner");
    }

    private static String name(Enum<?> value) {
        return value.name().toLowerCase(Locale.ROOT).replace('_', '-');
    }

    private void check(FileSource source) {
        boolean pattern = field == Field.PATTERN;
        boolean bad = symmetry == Symmetry.HERMITIAN && field != Field.COMPLEX
                || symmetry == Symmetry.SKEW_SYMMETRIC && pattern
                || layout == MatrixMarketLayout.ARRAY && pattern;
        if (bad) {
            throw source.atLine(
                    1,
                    "the banner combines " + name(layout) + ", " + name(field) + " and " + name(symmetry),
                    "hermitian with complex only, pattern with coordinate and general or symmetric only",
                    "correct the banner");
        }
    }

    /** The banner line. */
    String text() {
        return "%%MatrixMarket matrix " + name(layout) + " " + name(field) + " " + name(symmetry);
    }

    boolean isTriangular() {
        return symmetry != Symmetry.GENERAL;
    }
}
