package org.minorant.study;

import java.util.ArrayList;
import java.util.List;

/** A strict reader of RFC 4180, written against the standard and not against the writer. */
final class Csv {

    private Csv() {}

    /** The records of a file, the header among them; every record must end with CRLF. */
    static List<List<String>> parse(String text) {
        List<List<String>> records = new ArrayList<>();
        List<String> record = new ArrayList<>();
        StringBuilder field = new StringBuilder();
        int i = 0;
        while (i < text.length()) {
            if (text.charAt(i) == '"') {
                i = quoted(text, i + 1, field);
            } else {
                while (",\r\n\"".indexOf(text.charAt(i)) < 0) {
                    field.append(text.charAt(i++));
                }
            }
            record.add(field.toString());
            field.setLength(0);
            if (text.charAt(i) == ',') {
                i++;
            } else if (text.startsWith("\r\n", i)) {
                i += 2;
                records.add(List.copyOf(record));
                record.clear();
            } else {
                throw new IllegalArgumentException("neither comma nor CRLF behind a field at character " + i);
            }
        }
        return records;
    }

    private static int quoted(String text, int start, StringBuilder field) {
        int i = start;
        while (true) {
            char c = text.charAt(i++);
            if (c != '"') {
                field.append(c);
            } else if (text.charAt(i) == '"') {
                field.append('"');
                i++;
            } else {
                return i;
            }
        }
    }
}
