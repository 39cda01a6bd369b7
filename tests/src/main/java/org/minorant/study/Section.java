package org.minorant.study;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * The part of a report that answers one pair, ensemble or channel line.
 *
 * @param kind "pair", "ensemble" or "channel"
 * @param name the name from the study file
 * @param subject what was asked, in one line
 * @param rows the numbers, those of one quantity next to each other
 * @param notes what the reader should know of these numbers besides
 */
record Section(String kind, String name, String subject, List<Row> rows, List<String> notes) {

    Section {
        rows = List.copyOf(rows);
        notes = List.copyOf(notes);
    }

    /** The rows by quantity, both in order of appearance. */
    Map<String, List<Row>> byQuantity() {
        Map<String, List<Row>> groups = new LinkedHashMap<>();
        for (Row r : rows) {
            groups.computeIfAbsent(r.quantity(), q -> new ArrayList<>()).add(r);
        }
        return groups;
    }
}
