package org.minorant.study;

import java.io.PrintStream;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.function.Supplier;
import org.minorant.core.InvalidInputException;
import org.minorant.study.StudyFile.ChannelLine;
import org.minorant.study.StudyFile.CopiesLine;
import org.minorant.study.StudyFile.EnsembleLine;
import org.minorant.study.StudyFile.PairLine;
import org.minorant.study.StudyFile.UsesLine;

/** One study from its file to its results: read all, check all, compute, write, draw. */
final class StudyRun {

    private final StudyFile file;
    private final Progress progress;
    private final List<Section> sections = new ArrayList<>();
    private final List<Drawing> drawings = new ArrayList<>();

    private StudyRun(StudyFile file, Progress progress) {
        this.file = file;
        this.progress = progress;
    }

    /** A chart still to be drawn, under the name of its file. */
    private record Drawing(String name, Supplier<String> svg) {}

    static StudyRun of(Path path, Progress progress) {
        return new StudyRun(StudyParser.parse(path), progress);
    }

    /** Computes everything, prints the report and writes the results. */
    void report(PrintStream out) {
        int analyses =
                file.pairs().size() + file.ensembles().size() + file.channels().size();
        int copies = file.copies().stream().mapToInt(l -> l.copies().size()).sum();
        int uses = file.uses().stream().mapToInt(l -> l.uses().size()).sum();
        progress.expect(file.states().size() + analyses + copies + uses + 1);
        States states = States.read(file, progress);
        check(states);
        // a place that cannot be written to must not cost the user the computation
        Outputs outputs = new Outputs(file.path(), file.output());
        compute(states);
        String text = ReportText.of(file, states, sections);
        out.print(text);
        out.flush();
        progress.step("writing to " + file.output());
        outputs.write("report.txt", text);
        outputs.write("numbers.csv", CsvText.of(sections));
        for (Drawing d : drawings) {
            outputs.write(d.name(), Charts.draw(file, d.svg()));
        }
        out.println();
        outputs.written().forEach(f -> out.println("wrote " + f));
        out.flush();
    }

    /** All lines are checked before the first number is computed: a typing error in the last line must not cost an hour. */
    private void check(States states) {
        file.pairs().forEach(l -> states.requireOneSpace(l.line(), List.of(l.first(), l.second())));
        file.ensembles().forEach(l -> states.requireOneSpace(l.line(), l.states()));
        file.channels().forEach(l -> states.requireOneSpace(l.line(), l.letters()));
    }

    private void compute(States states) {
        for (PairLine line : file.pairs()) {
            progress.step("pair " + line.name());
            PairSection pair = at(line.line(), () -> PairSection.of(line, states, file.errors()));
            sections.add(pair.section());
            drawings.add(new Drawing(
                    "tradeoff-" + line.name() + ".svg", () -> TradeOffChart.svg(file.title(), line, pair.plot())));
            drawings.add(new Drawing(
                    "bounds-" + line.name() + ".svg",
                    () -> BoundsChart.svg(
                            Charts.title(file.title(), "bounds on the minimum error of " + line.name()),
                            "minimum error (probability, logarithmic axis)",
                            Bars.ofPair(pair.section()))));
        }
        for (CopiesLine line : file.copies()) {
            CopiesSection many = at(
                    line.line(),
                    () -> CopiesSection.of(
                            line,
                            file.pair(line.pair()),
                            states,
                            n -> progress.step("pair " + line.pair() + ", copies: " + n)));
            sections.add(many.section());
            drawings.add(new Drawing(
                    "copies-" + line.pair() + ".svg",
                    () -> CopiesChart.errors(file.title(), line.pair(), many.plot())));
            drawings.add(new Drawing(
                    "exponents-" + line.pair() + ".svg",
                    () -> CopiesChart.exponents(file.title(), line.pair(), many.plot())));
        }
        for (EnsembleLine line : file.ensembles()) {
            progress.step("ensemble " + line.name());
            sections.add(at(line.line(), () -> EnsembleSection.of(line, states)));
        }
        for (ChannelLine line : file.channels()) {
            progress.step("channel " + line.name());
            Section section = at(line.line(), () -> ChannelSection.of(line, states, file.errors(), file.messages()));
            sections.add(section);
            drawings.add(new Drawing(
                    "bounds-" + line.name() + ".svg",
                    () -> BoundsChart.svg(
                            Charts.title(file.title(), "messages that one use of " + line.name() + " carries"),
                            "number of messages (logarithmic axis)",
                            Bars.ofChannel(section))));
        }
        for (UsesLine line : file.uses()) {
            UsesSection many = at(
                    line.line(),
                    () -> UsesSection.of(
                            line,
                            file.channel(line.channel()),
                            states,
                            n -> progress.step("channel " + line.channel() + ", uses: " + n)));
            sections.add(many.section());
            drawings.add(new Drawing(
                    "uses-" + line.channel() + ".svg", () -> UsesChart.svg(file.title(), line.channel(), many.plot())));
        }
    }

    /** What the library itself refuses is reported with the line that asked for it. */
    private <T> T at(int line, Supplier<T> computation) {
        try {
            return computation.get();
        } catch (InvalidInputException e) {
            throw BadInputException.at(file.path(), line, e.getMessage());
        }
    }
}
