package org.minorant.tests.contract;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Collection;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;

/** Every fenced Java block of README.md and DEVELOPERS.md is, white space aside, a whole snippet of a test in this package, which runs. */
class ReadmeTest {

    @Test
    void everyJavaBlockIsARegionOfATestThatRuns() {
        Collection<String> snippets = SourceRegions.ofThisPackage().values();
        for (String name : List.of("README.md", "DEVELOPERS.md")) {
            Path file = SourceRegions.root().resolve(name);
            List<String> blocks = Files.exists(file) ? SourceRegions.blocks(SourceRegions.read(file)) : List.of();
            for (String block : blocks) {
                assertTrue(snippets.contains(block), () -> name + " shows what no test runs: " + block);
            }
            assertTrue(!blocks.isEmpty() || !name.equals("README.md"), "README.md shows no Java at all");
        }
    }

    @Test
    void blocksAreFoundInMarkdown() {
        String markdown = "Text\n```java\nint a = 1;\n\n   int  b = 2;\n```\n```sh\nls\n```\n``` java\nint c;\n```\n";
        assertEquals(List.of("int a = 1; int b = 2;", "int c;"), SourceRegions.blocks(markdown));
    }

    @Test
    void regionsAreFoundInSources() {
        String source = "void x() {\n    // snippet one\n    int a =\n        1;\n    // end snippet\n    int b;\n}\n";
        assertEquals(Map.of("one", "int a = 1;"), SourceRegions.regions(source));
        assertThrows(IllegalStateException.class, () -> SourceRegions.regions(source + source));
    }

    @Test
    void theRegionsOfThisPackageAreSeen() {
        assertTrue(SourceRegions.ofThisPackage().containsKey("contract"));
    }
}
