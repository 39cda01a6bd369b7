package org.minorant.study;

import java.nio.file.Path;
import java.util.List;

/**
 * What a study file says. Every name has been checked: states exist, lists are not empty, numbers lie in their ranges.
 *
 * @param path the study file, for messages
 * @param title the title, or the file's name if it gives none
 * @param states the states, in the order of the file
 * @param pairs the pairs of states to tell apart
 * @param copies the pairs to tell apart by many copies
 * @param ensembles the ensembles to tell apart
 * @param channels the channels to code for
 * @param uses the channels to code for in many uses
 * @param errors error levels in increasing order
 * @param messages numbers of messages in increasing order
 * @param output the directory that results go to
 */
record StudyFile(
        Path path,
        String title,
        List<StateLine> states,
        List<PairLine> pairs,
        List<CopiesLine> copies,
        List<EnsembleLine> ensembles,
        List<ChannelLine> channels,
        List<UsesLine> uses,
        List<Double> errors,
        List<Long> messages,
        Path output) {

    StudyFile {
        states = List.copyOf(states);
        pairs = List.copyOf(pairs);
        copies = List.copyOf(copies);
        ensembles = List.copyOf(ensembles);
        channels = List.copyOf(channels);
        uses = List.copyOf(uses);
        errors = List.copyOf(errors);
        messages = List.copyOf(messages);
    }

    /** What is to be done with a file whose matrix is not quite a density operator. */
    enum Repair {
        /** Refuse it. */
        NONE,
        /** Take the nearest density operator and say how far it was. */
        NEAREST
    }

    /** A state and the file that holds its density matrix, resolved against the study file's directory. */
    record StateLine(int line, String name, Path file, Repair repair) {}

    /** Two states to tell apart; the prior probability is that of the first. */
    record PairLine(int line, String name, String first, String second, double prior) {}

    /** A pair that was named above, and numbers of copies in increasing order. */
    record CopiesLine(int line, String pair, List<Integer> copies) {
        CopiesLine {
            copies = List.copyOf(copies);
        }
    }

    /** The pair of a name. */
    PairLine pair(String name) {
        return pairs.stream().filter(p -> p.name().equals(name)).findFirst().orElseThrow();
    }

    /** States with prior probabilities. */
    record EnsembleLine(int line, String name, List<String> states, List<Double> priors) {
        EnsembleLine {
            states = List.copyOf(states);
            priors = List.copyOf(priors);
        }
    }

    /** A channel that sends one state for each letter. */
    record ChannelLine(int line, String name, List<String> letters) {
        ChannelLine {
            letters = List.copyOf(letters);
        }
    }

    /** A channel that was named above, an average error, and numbers of uses in increasing order. */
    record UsesLine(int line, String channel, double error, List<Integer> uses) {
        UsesLine {
            uses = List.copyOf(uses);
        }
    }

    /** The channel of a name. */
    ChannelLine channel(String name) {
        return channels.stream().filter(c -> c.name().equals(name)).findFirst().orElseThrow();
    }
}
