package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;

/** Prints a ledger as a table of plain text: columns as wide as their longest entry, two spaces apart. */
final class LedgerTable {

    private static final List<String> HEADER = List.of("side", "value", "theorem", "checked", "source");

    private LedgerTable() {}

    static String of(Ledger ledger) {
        List<List<String>> rows = new ArrayList<>();
        rows.add(HEADER);
        for (Bound b : ledger) {
            rows.add(List.of(
                    b.side().toString(),
                    b.information().isPresent()
                            ? b.information().get().toString()
                            : b.value().toString(),
                    b.theorem().name(),
                    b.hypotheses().isEmpty() ? "-" : String.join("; ", b.hypotheses()),
                    b.theorem().source()));
        }
        int[] width = new int[HEADER.size()];
        for (List<String> row : rows) {
            for (int c = 0; c < width.length; c++) {
                width[c] = Math.max(width[c], row.get(c).length());
            }
        }
        StringBuilder text = new StringBuilder("Bounds on the " + ledger.quantity() + "\n");
        for (List<String> row : rows) {
            StringBuilder line = new StringBuilder();
            for (int c = 0; c < width.length; c++) {
                line.append(row.get(c)).append(" ".repeat(width[c] - row.get(c).length() + 2));
            }
            text.append(line.toString().stripTrailing()).append('\n');
        }
        return text.toString();
    }
}
