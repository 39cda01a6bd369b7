package org.minorant.study;

import java.util.List;

/** Picks the rows of a section that are drawn as bounds. */
final class Bars {

    private Bars() {}

    /** The bounds on the minimum error of a pair. */
    static List<Bar> ofPair(Section section) {
        return section.rows().stream()
                .filter(r -> r.quantity().equals(PairSection.MINIMUM_ERROR))
                .map(r -> new Bar(
                        r.by().method(), r.side(), r.value().lower(), r.value().upper()))
                .toList();
    }

    /** The bounds on the number of messages, a number again instead of its logarithm. */
    static List<Bar> ofChannel(Section section) {
        return section.rows().stream()
                .filter(r -> r.quantity().equals(ChannelSection.MESSAGES))
                .map(r -> new Bar(
                        r.argument().replaceFirst("average error at most", "error") + ": " + r.by().method(),
                        r.side(),
                        Math.pow(2, r.value().lower()),
                        Math.pow(2, r.value().upper())))
                .toList();
    }
}
