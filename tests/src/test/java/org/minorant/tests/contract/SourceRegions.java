package org.minorant.tests.contract;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;

/**
 * Regions of test sources, between the lines {@code // snippet NAME} and {@code // end snippet}, and fenced Java blocks of Markdown text. Both are compared
 * after runs of white space have become one space, so that the formatter is free.
 */
final class SourceRegions {

    private static final Pattern REGION =
            Pattern.compile("(?m)^ *// snippet (\\S+)\\R(.*?)^ *// end snippet *$", Pattern.DOTALL);

    private static final Pattern BLOCK = Pattern.compile("(?m)^``` *java *\\R(.*?)^``` *$", Pattern.DOTALL);

    private SourceRegions() {}

    /** The regions of a source text, by name. */
    static Map<String, String> regions(String source) {
        Map<String, String> found = new TreeMap<>();
        Matcher m = REGION.matcher(source);
        while (m.find()) {
            if (found.put(m.group(1), normalised(m.group(2))) != null) {
                throw new IllegalStateException("two snippets are called " + m.group(1));
            }
        }
        return found;
    }

    /** The Java blocks of a Markdown text, in order. */
    static List<String> blocks(String markdown) {
        List<String> found = new ArrayList<>();
        Matcher m = BLOCK.matcher(markdown);
        while (m.find()) {
            found.add(normalised(m.group(1)));
        }
        return found;
    }

    /** White space made single. */
    static String normalised(String text) {
        return text.strip().replaceAll("\\s+", " ");
    }

    /** The root of the project: the nearest directory above that holds DEVELOPERS.md. */
    static Path root() {
        Path p = Path.of("").toAbsolutePath();
        while (p != null && !Files.exists(p.resolve("DEVELOPERS.md"))) {
            p = p.getParent();
        }
        if (p == null) {
            throw new IllegalStateException(
                    "no DEVELOPERS.md above " + Path.of("").toAbsolutePath());
        }
        return p;
    }

    /** All regions of the test sources of this package. */
    static Map<String, String> ofThisPackage() {
        Path folder = root().resolve("tests/src/test/java/org/minorant/tests/contract");
        Map<String, String> all = new TreeMap<>();
        try (Stream<Path> files = Files.list(folder)) {
            files.filter(f -> f.getFileName().toString().endsWith(".java"))
                    .sorted()
                    .forEach(f -> regions(read(f)).forEach((name, text) -> {
                        if (all.put(name, text) != null) {
                            throw new IllegalStateException("two snippets are called " + name);
                        }
                    }));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return all;
    }

    static String read(Path file) {
        try {
            return Files.readString(file);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
