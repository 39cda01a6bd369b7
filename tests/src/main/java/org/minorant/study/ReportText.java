package org.minorant.study;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.OptionalDouble;
import org.minorant.core.DensityOperator;
import org.minorant.study.StudyFile.StateLine;

/**
 * The report as plain text, one table for each pair, ensemble and channel, with numbered sources at the end. Numbers are printed with certain
 * digits only: of a value known to 13 digits, 13 are shown.
 */
final class ReportText {

    private static final List<String> HEADER = List.of("", "side", "value", "unit", "by");

    private final List<String> sources = new ArrayList<>();
    private final StringBuilder text = new StringBuilder();

    private ReportText() {}

    static String of(StudyFile file, States states, List<Section> sections) {
        ReportText report = new ReportText();
        report.head(file, states);
        sections.forEach(report::section);
        report.tail();
        return report.text.toString();
    }

    private void head(StudyFile file, States states) {
        text.append(file.title())
                .append('\n')
                .append("=".repeat(file.title().length()))
                .append("\n\n");
        List<List<String>> rows = new ArrayList<>();
        Path home = file.path().toAbsolutePath().normalize().getParent();
        rows.add(List.of("state", "dimension", "file", "taken"));
        for (StateLine s : file.states()) {
            DensityOperator state = states.get(s.name());
            rows.add(List.of(s.name(), Integer.toString(state.dimension()), file(home, s.file()), taken(states, s)));
        }
        Columns.append(text, rows);
    }

    /** A path relative to the study file, so that the report is the same wherever the study lies. */
    private static String file(Path home, Path file) {
        Path absolute = file.toAbsolutePath().normalize();
        return absolute.startsWith(home) ? home.relativize(absolute).toString() : file.toString();
    }

    private static String taken(States states, StateLine line) {
        OptionalDouble distance = states.distance(line.name());
        return distance.isEmpty()
                ? "as it is"
                : String.format(Locale.ROOT, "as the nearest state, %.1e away", distance.getAsDouble());
    }

    private void section(Section s) {
        String heading = s.kind() + " " + s.name() + ": " + s.subject();
        text.append('\n')
                .append(heading)
                .append('\n')
                .append("-".repeat(heading.length()))
                .append('\n');
        List<List<String>> rows = new ArrayList<>();
        rows.add(HEADER);
        for (Map.Entry<String, List<Row>> group : s.byQuantity().entrySet()) {
            boolean alone = group.getValue().size() == 1;
            if (!alone) {
                rows.add(List.of(group.getKey()));
            }
            for (Row r : group.getValue()) {
                rows.add(line(alone ? quantity(r) : "", r));
            }
        }
        Columns.append(text, rows);
        for (String note : s.notes()) {
            text.append(note).append('\n');
        }
    }

    /** Where nothing else tells rows apart, they are told apart by their method, which then need not be repeated. */
    private List<String> line(String quantity, Row r) {
        String method = r.by().method();
        String number = "[" + number(r.by().source()) + "]";
        boolean methodAhead =
                quantity.isEmpty() && (r.argument().isEmpty() || r.argument().equals(method));
        return List.of(
                !quantity.isEmpty() ? quantity : "  " + (r.argument().isEmpty() ? method : r.argument()),
                r.side().toString(),
                r.value().toString(),
                r.unit().toString(),
                methodAhead ? number : method + " " + number);
    }

    private static String quantity(Row r) {
        return r.argument().isEmpty() ? r.quantity() : r.quantity() + ", " + r.argument();
    }

    /** The number of a source, in order of first use. */
    private int number(String source) {
        int i = sources.indexOf(source);
        if (i < 0) {
            sources.add(source);
            i = sources.size() - 1;
        }
        return i + 1;
    }

    private void tail() {
        text.append("\nSources\n-------\n");
        for (int i = 0; i < sources.size(); i++) {
            text.append('[').append(i + 1).append("] ").append(sources.get(i)).append('\n');
        }
        text.append('\n')
                .append(
                        "Every digit shown is certain for the states as read. How well the states describe a device, and how well they were\n")
                .append(
                        "estimated, these numbers do not say. Have decisions on safety or security reviewed by someone qualified.\n");
    }
}
