package org.minorant.study;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.function.IntConsumer;
import org.minorant.bounds.Bound;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.bounds.Ledger;
import org.minorant.bounds.Side;
import org.minorant.core.Enclosure;
import org.minorant.study.StudyFile.ChannelLine;
import org.minorant.study.StudyFile.UsesLine;

/**
 * What many uses of a channel carry: a number of messages that some code surely reaches, one that no code exceeds, and how both approach the capacity.
 *
 * @param section the numbers
 * @param plot the curves against n
 */
record UsesSection(Section section, UsesPlot plot) {

    /** The quantity that the ledgers bound, by the number of uses. */
    static String messages(int n) {
        return ChannelSection.MESSAGES + ", " + uses(n);
    }

    private static String uses(int n) {
        return n == 1 ? "1 use" : n + " uses";
    }

    /** Computes everything; the listener is told each number of uses before its turn. */
    static UsesSection of(UsesLine line, ChannelLine asked, States states, IntConsumer progress) {
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(states.get(asked.letters()));
        Enclosure capacity = channel.capacity().value().bits();
        CodingBounds once = CodingBounds.of(channel);
        Rows rows = new Rows();
        UsesPlot.Builder plot = new UsesPlot.Builder();
        List<String> notes = new ArrayList<>();
        List<Bound> reached = new ArrayList<>();
        List<Bound> excluded = new ArrayList<>();
        for (int n : line.uses()) {
            progress.accept(n);
            CodingBounds many = once.uses(n);
            Ledger ledger = many.ledger(line.error());
            rows.ledger(messages(n), "", ledger);
            for (Bound b : ledger) {
                plot.add(b.theorem().name(), b.side(), n, bits(b));
            }
            reached.add(best(ledger, Side.LOWER));
            excluded.add(best(ledger, Side.UPPER));
            double normal = many.normalApproximation(line.error()).bits();
            plot.normal(n, normal);
            notes.add(String.format(Locale.ROOT, "Normal approximation, %s: %.6g bit.", uses(n), normal));
        }
        for (int i = 0; i < reached.size(); i++) {
            Enclosure n = Enclosure.exact(line.uses().get(i));
            String argument = uses(line.uses().get(i));
            rows.bound(
                    "bits for each use",
                    argument,
                    Side.LOWER,
                    bits(reached.get(i)).dividedBy(n),
                    Unit.BITS_PER_USE,
                    Citation.of(reached.get(i)));
            rows.bound(
                    "bits for each use",
                    argument,
                    Side.UPPER,
                    bits(excluded.get(i)).dividedBy(n),
                    Unit.BITS_PER_USE,
                    Citation.of(excluded.get(i)));
        }
        rows.exact("capacity", "", capacity, Unit.BITS, Citation.CAPACITY);
        notes.add(
                0,
                "Some code reaches every lower bound at an average error of at most " + line.error()
                        + "; none exceeds an upper one. The normal approximation is no bound:");
        notes.add(
                1, "nothing is promised of it. All this is about the channel as given, used independently each time.");
        return new UsesSection(
                new Section(
                        "uses",
                        line.channel(),
                        "many uses of " + String.join(", ", asked.letters()) + ", average error at most "
                                + line.error(),
                        rows.all(),
                        notes),
                plot.build(capacity));
    }

    private static Enclosure bits(Bound b) {
        return b.information().orElseThrow().bits();
    }

    /** The best bound of a side: ledgers have them in order. */
    private static Bound best(Ledger ledger, Side side) {
        List<Bound> all = new ArrayList<>();
        ledger.forEach(b -> {
            if (b.side() == side) {
                all.add(b);
            }
        });
        return side == Side.LOWER ? all.get(all.size() - 1) : all.get(0);
    }
}
