package org.minorant.study;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.List;
import java.util.stream.Stream;

/** One run of the shipped demo, in a copy of its files, for all tests that look at its results. */
record DemoRun(SmallStudy.Outcome outcome, Path results) {

    /** The shipped files, seen from the directory that tests run in. */
    static final Path SHIPPED = Path.of("studies");

    private static final class Holder {
        private static final DemoRun ONCE = make();
    }

    static DemoRun get() {
        return Holder.ONCE;
    }

    static List<Path> shipped() throws IOException {
        try (Stream<Path> files = Files.list(SHIPPED)) {
            return files.sorted().toList();
        }
    }

    String result(String name) throws IOException {
        return Files.readString(results.resolve(name));
    }

    List<List<String>> rows() throws IOException {
        return Csv.parse(result("numbers.csv"));
    }

    private static DemoRun make() {
        Path copy = Path.of("target", "test-demo", "studies");
        Path results = Path.of("target", "test-demo", "target", "demo-study");
        try {
            Files.createDirectories(copy);
            for (Path file : shipped()) {
                Files.copy(file, copy.resolve(file.getFileName()), StandardCopyOption.REPLACE_EXISTING);
            }
            // results of an earlier build must not stand in for those of this one
            if (Files.exists(results)) {
                try (Stream<Path> old = Files.list(results)) {
                    for (Path file : old.toList()) {
                        Files.delete(file);
                    }
                }
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return new DemoRun(
                SmallStudy.run(() -> 0L, List.of(copy.resolve("demo.study").toString())), results);
    }
}
