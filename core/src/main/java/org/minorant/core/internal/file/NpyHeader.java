package org.minorant.core.internal.file;

import java.nio.ByteOrder;
import java.util.ArrayList;
import java.util.List;
import org.minorant.core.InvalidInputException;

/**
 * The header of a {@code .npy} file: a Python dictionary literal with the keys {@code descr}, {@code fortran_order} and {@code shape}, each
 * once, in any order. Read by hand, character by character; nothing is evaluated.
 *
 * @param order the byte order of the numbers
 * @param complex whether each entry is two numbers, real and imaginary part
 * @param columnMajor whether entries follow each other column by column
 * @param shape one or two dimensions, each at least 1
 */
record NpyHeader(ByteOrder order, boolean complex, boolean columnMajor, List<Long> shape) {

    long rows() {
        return shape.get(0);
    }

    long columns() {
        return shape.size() == 1 ? 1 : shape.get(1);
    }

    int entryBytes() {
        return complex ? 16 : 8;
    }

    /** The dictionary of version 1 for a row-major matrix in little-endian order. */
    static String text(int rows, int columns, boolean complex) {
        return "{'descr': '" + (complex ? "<c16" : "<f8") + "', 'fortran_order': False, 'shape': (" + rows + ", "
                + columns + "), }";
    }

    /** Parses the text that starts at a byte of the file. */
    static NpyHeader parse(String text, long start, FileSource source) {
        return new Parser(text, start, source).dictionary();
    }

    /** A cursor on the text. */
    private static final class Parser {

        private static final int DIGITS = 10;

        private final String text;
        private final long start;
        private final FileSource source;
        private int at;

        Parser(String text, long start, FileSource source) {
            this.text = text;
            this.start = start;
            this.source = source;
        }

        NpyHeader dictionary() {
            String descr = "";
            String columnMajor = "";
            List<Long> shape = List.of();
            expect('{');
            while (!accept('}')) {
                int keyAt = at;
                String key = string();
                expect(':');
                if (key.equals("descr") && descr.isEmpty()) {
                    descr = descr();
                } else if (key.equals("fortran_order") && columnMajor.isEmpty()) {
                    columnMajor = flag();
                } else if (key.equals("shape") && shape.isEmpty()) {
                    shape = shape();
                } else {
                    at = keyAt;
                    throw refusal("the key " + Quoted.of(key), "descr, fortran_order and shape, each once");
                }
                if (!accept(',')) {
                    expect('}');
                    break;
                }
            }
            if (descr.isEmpty() || columnMajor.isEmpty() || shape.isEmpty()) {
                throw refusal("the end of a dictionary that lacks a key", "descr, fortran_order and shape, each once");
            }
            padding();
            ByteOrder order = descr.charAt(0) == '<' ? ByteOrder.LITTLE_ENDIAN : ByteOrder.BIG_ENDIAN;
            return new NpyHeader(order, descr.endsWith("c16"), columnMajor.equals("True"), shape);
        }

        private String descr() {
            skip();
            int from = at;
            String d = string();
            if (!List.of("<f8", ">f8", "<c16", ">c16").contains(d)) {
                at = from;
                throw refusal("the type " + Quoted.of(d), "<f8, >f8, <c16 or >c16: float64 or complex128");
            }
            return d;
        }

        private String flag() {
            skip();
            for (String word : List.of("True", "False")) {
                if (text.startsWith(word, at)) {
                    at += word.length();
                    return word;
                }
            }
            throw refusal(found(), "True or False");
        }

        private List<Long> shape() {
            skip();
            int from = at;
            List<Long> dimensions = new ArrayList<>();
            expect('(');
            boolean comma = true;
            while (!accept(')')) {
                if (!comma) {
                    throw refusal(found(), "a comma or )");
                }
                dimensions.add(dimension());
                comma = accept(',');
            }
            // (3) without a comma is a number in brackets, not a tuple
            if (dimensions.isEmpty() || dimensions.size() > 2 || dimensions.size() == 1 && !comma) {
                at = from;
                throw refusal("a shape of " + dimensions.size() + " dimensions", "(d,) for a ket or (rows, columns)");
            }
            return List.copyOf(dimensions);
        }

        private long dimension() {
            skip();
            int from = at;
            while (at < text.length() && text.charAt(at) >= '0' && text.charAt(at) <= '9') {
                at++;
            }
            int digits = at - from;
            long n = digits > 0 && digits <= DIGITS ? Long.parseLong(text.substring(from, at)) : 0;
            if (n < 1 || n > Integer.MAX_VALUE) {
                at = from;
                throw refusal(found(), "a dimension from 1 to " + Integer.MAX_VALUE);
            }
            return n;
        }

        private String string() {
            skip();
            char quote = at < text.length() ? text.charAt(at) : ' ';
            int end = quote == '\'' || quote == '"' ? text.indexOf(quote, at + 1) : -1;
            if (end < 0) {
                throw refusal(found(), "a string in quotes");
            }
            String s = text.substring(at + 1, end);
            at = end + 1;
            return s;
        }

        /** After the dictionary only spaces, then one line feed. */
        private void padding() {
            skip();
            if (at != text.length() - 1 || text.charAt(at) != '\n') {
                throw refusal(found(), "spaces up to a line feed that ends the header");
            }
        }

        private boolean accept(char c) {
            skip();
            if (at < text.length() && text.charAt(at) == c) {
                at++;
                return true;
            }
            return false;
        }

        private void expect(char c) {
            if (!accept(c)) {
                throw refusal(found(), "the character " + c);
            }
        }

        private void skip() {
            while (at < text.length() && text.charAt(at) == ' ') {
                at++;
            }
        }

        private String found() {
            return at < text.length() ? "the header has " + Quoted.of(text.substring(at)) : "the header ends here";
        }

        private InvalidInputException refusal(String found, String limit) {
            return source.atByte(start + at, found, limit, "write the array again as complex128 or float64");
        }
    }
}
