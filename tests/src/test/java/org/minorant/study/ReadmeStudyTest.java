package org.minorant.study;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/** What README says of studies, against what the runner does. */
class ReadmeStudyTest {

    private static final Path ROOT = Path.of("..");

    private static String readme() throws IOException {
        return Files.readString(ROOT.resolve("README.md"));
    }

    private static List<String> blocks(String language) throws IOException {
        return Pattern.compile("(?ms)^```" + language + "\\R(.*?)^```$")
                .matcher(readme())
                .results()
                .map(r -> r.group(1))
                .toList();
    }

    private static List<String> statements(String study) {
        return study.lines().filter(l -> !l.isBlank() && !l.startsWith("#")).toList();
    }

    @Test
    void theExampleStudyIsTheDemo() throws IOException {
        assertEquals(
                statements(Files.readString(Path.of("studies", "demo.study"))),
                statements(blocks("study").get(0)));
    }

    @Test
    void theExcerptIsFromTheDemosReportAndEveryMethodIsInTheTable() throws IOException {
        String report = DemoRun.get().result("report.txt");
        assertEquals(2, blocks("text").size());
        for (String excerpt : blocks("text")) {
            assertTrue(report.contains(excerpt), "an excerpt of README is not in the demo's report:\n" + report);
        }
        String readme = readme();
        List<List<String>> rows = DemoRun.get().rows();
        for (List<String> r : rows.subList(1, rows.size())) {
            boolean ownRow = r.get(2).equals("divergence") || r.get(8).equals(Citation.CHOICE.method());
            assertTrue(ownRow || readme.contains(r.get(8).replace(" as stored", "")), r.get(8));
        }
    }

    @Test
    void everyClassThatReadmeNamesExists() throws IOException {
        List<String> sources;
        try (Stream<Path> files = Files.walk(ROOT)) {
            sources = files.map(f -> f.getFileName().toString())
                    .filter(f -> f.endsWith(".java"))
                    .toList();
        }
        Matcher m = Pattern.compile("`([A-Z][A-Za-z]*[a-z])`").matcher(readme());
        int seen = 0;
        while (m.find()) {
            seen++;
            assertTrue(sources.contains(m.group(1) + ".java"), m.group(1));
        }
        assertTrue(seen > 15);
    }

    /** A statement that README does not explain, or explains and is not read, is a fault. */
    @Test
    void theStatementsOfReadmeAreThoseThatAreRead() throws IOException {
        List<String> explained = Pattern.compile("(?m)^\\| `([a-z]+) [A-Z]")
                .matcher(readme())
                .results()
                .map(r -> r.group(1))
                .toList();
        assertEquals(List.of(StudyParser.KEYWORDS.split(", ")), explained);
    }
}
