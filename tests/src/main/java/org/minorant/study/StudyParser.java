package org.minorant.study;

import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Collections;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import org.minorant.study.StudyFile.ChannelLine;
import org.minorant.study.StudyFile.CopiesLine;
import org.minorant.study.StudyFile.EnsembleLine;
import org.minorant.study.StudyFile.PairLine;
import org.minorant.study.StudyFile.Repair;
import org.minorant.study.StudyFile.StateLine;
import org.minorant.study.StudyFile.UsesLine;

/**
 * Reads a study file. One statement a line, a keyword first, words apart by spaces or tabs; {@code #} at the start of a line or after a space
 * begins a comment. README has the table of statements. Order is free, except that a state is named before it is used.
 */
final class StudyParser {

    static final String KEYWORDS =
            "title, state, nearest, pair, copies, ensemble, channel, uses, errors, messages, output";

    private static final List<Double> DEFAULT_ERRORS = List.of(0.001, 0.01, 0.1);

    private static final List<Long> DEFAULT_MESSAGES = List.of(2L, 4L, 8L);

    private final Path path;
    private final Map<String, Integer> lineOfState = new HashMap<>();
    private final Map<String, Integer> lineOfAnalysis = new HashMap<>();
    private final Map<String, Integer> lineOfSetting = new HashMap<>();
    private final List<StateLine> states = new ArrayList<>();
    private final List<PairLine> pairs = new ArrayList<>();
    private final List<CopiesLine> copies = new ArrayList<>();
    private final List<EnsembleLine> ensembles = new ArrayList<>();
    private final List<ChannelLine> channels = new ArrayList<>();
    private final List<UsesLine> uses = new ArrayList<>();
    private String title;
    private List<Double> errors = DEFAULT_ERRORS;
    private List<Long> messages = DEFAULT_MESSAGES;
    private Path output;

    private StudyParser(Path path) {
        this.path = path;
        String name = String.valueOf(path.getFileName());
        String stem = name.replaceFirst("\\.[^.]*$", "");
        this.title = name;
        this.output =
                path.resolveSibling((stem.isEmpty() ? name : stem) + "-results").normalize();
    }

    /**
     * Reads a study file.
     *
     * @throws BadInputException with the file, the line and the cure
     */
    static StudyFile parse(Path path) {
        StudyParser parser = new StudyParser(path);
        List<String> lines = StudyText.lines(path);
        for (int i = 0; i < lines.size(); i++) {
            parser.line(i + 1, lines.get(i).replaceFirst("(^|\\s)#.*$", "").strip());
        }
        return parser.finish();
    }

    private StudyFile finish() {
        if (states.isEmpty()) {
            throw BadInputException.in(path, "names no state; add a line such as 'state calm calm.mtx'");
        }
        if (pairs.isEmpty() && ensembles.isEmpty() && channels.isEmpty()) {
            throw BadInputException.in(path, "asks for nothing; add a pair, an ensemble or a channel line");
        }
        return new StudyFile(path, title, states, pairs, copies, ensembles, channels, uses, errors, messages, output);
    }

    private void line(int number, String text) {
        if (text.isEmpty()) {
            return;
        }
        String[] parts = text.split("\\s+", 2);
        StudyWords words = new StudyWords(path, number, parts[0], parts.length < 2 ? "" : parts[1]);
        switch (parts[0]) {
            case "title" -> title(words);
            case "state" -> state(words, Repair.NONE);
            case "nearest" -> state(words, Repair.NEAREST);
            case "pair" -> pair(words);
            case "copies" -> copies(words);
            case "ensemble" -> ensemble(words);
            case "channel" -> channel(words);
            case "uses" -> uses(words);
            case "errors" -> errors(words);
            case "messages" -> messages(words);
            case "output" -> output(words);
            default ->
                throw words.fault(
                        "unknown word " + OneLine.quote(parts[0]) + "; a line begins with one of " + KEYWORDS);
        }
    }

    private void title(StudyWords words) {
        once(words);
        title = OneLine.of(words.rest("a title"));
    }

    private void output(StudyWords words) {
        once(words);
        output = resolve(words, words.rest("a directory"));
    }

    private void state(StudyWords words, Repair repair) {
        String name = newName(words, lineOfState);
        states.add(new StateLine(words.line(), name, resolve(words, words.rest("a file")), repair));
    }

    private void pair(StudyWords words) {
        String name = newName(words, lineOfAnalysis);
        String first = knownState(words, words.next("the first state"));
        String second = knownState(words, words.next("the second state"));
        words.expect("prior");
        double prior = words.probability(words.next("the prior probability of " + first));
        words.end();
        pairs.add(new PairLine(words.line(), name, first, second, prior));
    }

    private void copies(StudyWords words) {
        String name = words.next("the name of a pair");
        if (pairs.stream().noneMatch(p -> p.name().equals(name))) {
            throw words.fault(
                    "no pair " + OneLine.quote(name) + " is named above this line; add a pair line before it");
        }
        for (CopiesLine c : copies) {
            if (c.pair().equals(name)) {
                throw words.fault("copies of " + name + " were already asked for in line " + c.line()
                        + "; give all numbers in one line");
            }
        }
        copies.add(new CopiesLine(words.line(), name, words.increasing("a number of copies", words::copies)));
    }

    private void ensemble(StudyWords words) {
        String name = newName(words, lineOfAnalysis);
        List<String> names = new ArrayList<>();
        List<Double> priors = new ArrayList<>();
        while (words.hasNext()) {
            String item = words.next("STATE or STATE:PRIOR");
            int colon = item.indexOf(':');
            names.add(knownState(words, colon < 0 ? item : item.substring(0, colon)));
            if (colon >= 0) {
                priors.add(words.probability(item.substring(colon + 1)));
            }
        }
        if (names.size() < 2) {
            throw words.fault("an ensemble needs at least two states, this has " + names.size());
        }
        if (!priors.isEmpty() && priors.size() < names.size()) {
            throw words.fault("only " + priors.size() + " of " + names.size()
                    + " states have a prior; give STATE:PRIOR for all, or" + " none for equal priors");
        }
        if (priors.isEmpty()) {
            priors.addAll(Collections.nCopies(names.size(), 1.0 / names.size()));
        }
        words.sumToOne(priors);
        ensembles.add(new EnsembleLine(words.line(), name, names, priors));
    }

    private void channel(StudyWords words) {
        String name = newName(words, lineOfAnalysis);
        List<String> letters = new ArrayList<>();
        while (words.hasNext()) {
            letters.add(knownState(words, words.next("a state")));
        }
        if (letters.size() < 2) {
            throw words.fault("a channel needs at least two letters, this has " + letters.size());
        }
        channels.add(new ChannelLine(words.line(), name, letters));
    }

    private void uses(StudyWords words) {
        String name = words.next("the name of a channel");
        if (channels.stream().noneMatch(c -> c.name().equals(name))) {
            throw words.fault(
                    "no channel " + OneLine.quote(name) + " is named above this line; add a channel line before it");
        }
        for (UsesLine u : uses) {
            if (u.channel().equals(name)) {
                throw words.fault("uses of " + name + " were already asked for in line " + u.line()
                        + "; give all numbers in one line");
            }
        }
        words.expect("error");
        double error = words.level(words.next("the average error allowed"));
        uses.add(new UsesLine(words.line(), name, error, words.increasing("a number of uses", words::uses)));
    }

    private void errors(StudyWords words) {
        once(words);
        errors = words.increasing("an error level", words::level);
    }

    private void messages(StudyWords words) {
        once(words);
        messages = words.increasing("a number of messages", words::count);
    }

    /** Settings may be given once: of two, the reader could not tell which holds. */
    private void once(StudyWords words) {
        Integer earlier = lineOfSetting.putIfAbsent(words.keyword(), words.line());
        if (earlier != null) {
            throw words.fault(words.keyword() + " was already given in line " + earlier + "; keep one of the two");
        }
    }

    /** Names are compared without case, since charts are named after them and some file systems ignore case. */
    private static String newName(StudyWords words, Map<String, Integer> taken) {
        String name = words.name();
        Integer earlier = taken.putIfAbsent(name.toLowerCase(Locale.ROOT), words.line());
        if (earlier != null) {
            throw words.fault("the name " + OneLine.quote(name) + " was already given in line " + earlier
                    + " (upper and lower case count as the same); choose another");
        }
        return name;
    }

    private String knownState(StudyWords words, String name) {
        for (StateLine s : states) {
            if (s.name().equals(name)) {
                return name;
            }
        }
        throw words.fault("no state " + OneLine.quote(name) + " is named above this line; add a state line before it");
    }

    private Path resolve(StudyWords words, String file) {
        try {
            return path.resolveSibling(file).normalize();
        } catch (InvalidPathException e) {
            throw words.fault(OneLine.quote(file) + " is not a path on this system: " + e.getReason());
        }
    }
}
