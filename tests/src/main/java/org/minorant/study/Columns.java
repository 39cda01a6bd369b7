package org.minorant.study;

import java.util.List;

/** A table of plain text: columns as wide as their longest entry, two spaces apart. */
final class Columns {

    private Columns() {}

    /** Appends the table; a row of a single entry is a heading, printed over all columns. */
    static void append(StringBuilder text, List<List<String>> rows) {
        int[] width = new int[rows.get(0).size()];
        for (List<String> row : rows) {
            for (int c = 0; row.size() > 1 && c < width.length; c++) {
                width[c] = Math.max(width[c], row.get(c).length());
            }
        }
        for (List<String> row : rows) {
            StringBuilder line = new StringBuilder();
            for (int c = 0; c < row.size(); c++) {
                line.append(row.get(c))
                        .append(" ".repeat(Math.max(0, width[c] - row.get(c).length()) + 2));
            }
            text.append(line.toString().stripTrailing()).append('\n');
        }
    }
}
