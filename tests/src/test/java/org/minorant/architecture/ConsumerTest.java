package org.minorant.architecture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.StringWriter;
import java.lang.module.Configuration;
import java.lang.module.ModuleFinder;
import java.lang.reflect.InvocationTargetException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import javax.tools.JavaCompiler;
import javax.tools.StandardJavaFileManager;
import javax.tools.ToolProvider;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A user's program on the module path: it compiles and runs with one {@code requires}, and cannot reach inside. */
class ConsumerTest {
    private static final String DESCRIPTOR = """
            module consumer {
                requires org.minorant.bounds;

                exports consumer;
            }
            """;

    @TempDir
    private Path folder;

    @Test
    void oneRequiresIsEnough() throws IOException, ReflectiveOperationException {
        Compilation compilation = compile("""
                package consumer;

                import org.minorant.core.DensityOperator;
                import org.minorant.measurement.HypothesisPair;

                public final class Consumer {
                    public static double[] minimumError() {
                        var first = DensityOperator.ofBloch(0.0, 0.0, 0.9);
                        var second = DensityOperator.ofBloch(0.6, 0.0, 0.5);
                        var error = HypothesisPair.of(first, second).minimumError(0.5);
                        return new double[] {error.lower(), error.upper()};
                    }
                }
                """);
        assertEquals("", compilation.messages());

        double[] enclosure = (double[]) run("minimumError");
        // Computed with 100-digit arithmetic: ½(1 − |v₁ − v₂|/2) for Bloch vectors (0, 0, 0.9) and (0.6, 0, 0.5).
        double expected = 0.3197224362268005353440389;
        assertTrue(enclosure[0] <= expected && expected <= enclosure[1], enclosure[0] + ".." + enclosure[1]);
    }

    @Test
    void internalPackagesStayOutOfReach() throws IOException {
        Compilation compilation = compile("""
                package consumer;

                import org.minorant.core.internal.door.*;

                public final class Consumer {}
                """);
        assertNotEquals("", compilation.messages());
        assertTrue(
                compilation.messages().contains("org.minorant.core.internal.door")
                        && compilation.messages().contains("does not export it"),
                compilation::messages);
    }

    private record Compilation(String messages) {}

    private Compilation compile(String source) throws IOException {
        Path sources = Files.createDirectories(folder.resolve("source/consumer"));
        Path descriptor = Files.writeString(sources.resolveSibling("module-info.java"), DESCRIPTOR);
        Path consumer = Files.writeString(sources.resolve("Consumer.java"), source);
        JavaCompiler compiler = ToolProvider.getSystemJavaCompiler();
        StringWriter messages = new StringWriter();
        try (StandardJavaFileManager files = compiler.getStandardFileManager(null, Locale.ROOT, null)) {
            List<String> options = List.of(
                    "--release",
                    "17",
                    "--module-path",
                    BuiltModules.modulePath(),
                    // Else the compiler would look into the class path of this test.
                    "--class-path",
                    Files.createDirectories(folder.resolve("empty")).toString(),
                    "-d",
                    folder.resolve("classes").toString());
            compiler.getTask(messages, files, null, options, null, files.getJavaFileObjects(descriptor, consumer))
                    .call();
        }
        return new Compilation(messages.toString());
    }

    private Object run(String method) throws ReflectiveOperationException {
        ModuleFinder program = ModuleFinder.compose(ModuleFinder.of(folder.resolve("classes")), BuiltModules.finder());
        ModuleLayer boot = ModuleLayer.boot();
        Configuration needed = boot.configuration().resolve(program, ModuleFinder.of(), Set.of("consumer"));
        ModuleLayer layer = boot.defineModulesWithOneLoader(needed, ClassLoader.getPlatformClassLoader());
        Class<?> main = layer.findLoader("consumer").loadClass("consumer.Consumer");
        assertEquals("consumer", main.getModule().getName());
        assertEquals(
                "org.minorant.core",
                layer.findLoader("consumer")
                        .loadClass("org.minorant.core.DensityOperator")
                        .getModule()
                        .getName());
        try {
            return main.getMethod(method).invoke(null);
        } catch (InvocationTargetException thrown) {
            throw new AssertionError(thrown.getCause());
        }
    }
}
