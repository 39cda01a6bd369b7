package org.minorant.study;

import java.util.List;
import org.minorant.bounds.Capacity;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.core.Enclosure;
import org.minorant.study.StudyFile.ChannelLine;

/** What there is to know of one use of a channel. */
final class ChannelSection {

    /** What the bounds of the ledgers are on. */
    static final String MESSAGES = "log2 of the largest number of messages";

    private ChannelSection() {}

    static Section of(ChannelLine line, States states, List<Double> levels, List<Long> messages) {
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(states.get(line.letters()));
        Capacity capacity = channel.capacity();
        CodingBounds once = CodingBounds.of(channel);
        Rows rows = new Rows();
        rows.exact("capacity", "", capacity.value().bits(), Unit.BITS, Citation.CAPACITY);
        double[] input = capacity.input();
        for (int x = 0; x < input.length; x++) {
            rows.exact(
                    "probability of a letter in the input used",
                    line.letters().get(x),
                    Enclosure.exact(input[x]),
                    Unit.PROBABILITY,
                    Citation.CHOICE);
        }
        for (double level : levels) {
            rows.ledger(MESSAGES, "average error at most " + level, once.ledger(level));
        }
        for (long m : messages) {
            rows.ledger("least average error of a code", m + " messages", once.errorLedger(m));
        }
        String subject = line.letters().size() + " letters, " + String.join(", ", line.letters());
        return new Section(
                "channel",
                line.name(),
                subject,
                rows.all(),
                List.of(
                        "One use of the channel. A lower bound on the number of messages is achieved by some code; an upper bound is"
                                + " exceeded by none."));
    }
}
