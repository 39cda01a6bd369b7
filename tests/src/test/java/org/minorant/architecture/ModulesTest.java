package org.minorant.architecture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.minorant.architecture.BuiltModules.BOUNDS;
import static org.minorant.architecture.BuiltModules.CORE;
import static org.minorant.architecture.BuiltModules.MEASUREMENT;

import java.io.IOException;
import java.lang.module.ModuleDescriptor;
import java.lang.module.ModuleDescriptor.Exports;
import java.lang.module.ModuleDescriptor.Requires;
import java.lang.module.ModuleReader;
import java.lang.module.ResolvedModule;
import java.util.HashSet;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.FieldSource;

/** What the published modules declare: whom they read, what they show and that each package introduces itself. */
class ModulesTest {
    static final java.util.List<String> PUBLISHED = BuiltModules.PUBLISHED;

    private static final String OJALGO = "ojalgo";
    private static final String GAMMA = "org.apache.commons.numbers.gamma";

    /** Each layer may read the one below and the two run-time dependencies, and nothing else of the platform or beyond. */
    private static final Map<String, Set<String>> MAY_READ = Map.of(
            CORE, Set.of("java.base", OJALGO, GAMMA),
            MEASUREMENT, Set.of("java.base", CORE, GAMMA),
            BOUNDS, Set.of("java.base", MEASUREMENT, GAMMA));

    @ParameterizedTest
    @FieldSource("PUBLISHED")
    void readsOnlyTheLayerBelowAndTheRunTimeDependencies(String name) {
        Set<String> read = BuiltModules.descriptor(name).requires().stream()
                .map(Requires::name)
                .collect(Collectors.toCollection(TreeSet::new));
        read.removeAll(MAY_READ.get(name));
        assertEquals(Set.of(), read, name + " reads what it must not");
    }

    @ParameterizedTest
    @FieldSource("PUBLISHED")
    void passesOnOnlyOwnModules(String name) {
        Set<String> passedOn = BuiltModules.descriptor(name).requires().stream()
                .filter(required -> required.modifiers().contains(Requires.Modifier.TRANSITIVE))
                .map(Requires::name)
                .filter(required -> !PUBLISHED.contains(required))
                .collect(Collectors.toSet());
        assertEquals(Set.of(), passedOn, name + " lets a dependency into its users' sight");
    }

    @ParameterizedTest
    @FieldSource("PUBLISHED")
    void keepsInternalPackagesToItself(String name) {
        ModuleDescriptor module = BuiltModules.descriptor(name);
        Set<String> shown = module.exports().stream().map(Exports::source).collect(Collectors.toSet());
        assertFalse(shown.isEmpty(), name + " exports nothing");
        // A qualified export would show internals to one friend: allowed between the published modules only.
        for (Exports exported : module.exports()) {
            if (exported.source().contains(".internal")) {
                assertTrue(exported.isQualified(), exported.source() + " is exported to everybody");
                assertTrue(PUBLISHED.containsAll(exported.targets()), exported + " goes beyond the published modules");
            }
        }
        assertFalse(module.isOpen(), name + " is open");
        assertEquals(Set.of(), module.opens(), name + " opens packages");
    }

    @ParameterizedTest
    @FieldSource("PUBLISHED")
    void everyPackageIntroducesItself(String name) throws IOException {
        Set<String> silent = new TreeSet<>();
        try (ModuleReader reader = BuiltModules.reference(name).open()) {
            for (String pack : BuiltModules.descriptor(name).packages()) {
                if (reader.find(pack.replace('.', '/') + "/package-info.class").isEmpty()) {
                    silent.add(pack);
                }
            }
        }
        assertEquals(Set.of(), silent, "without package-info");
    }

    @Test
    void aProgramNeedsTheTwoDependenciesAndNothingElse() {
        Set<String> needed = new HashSet<>();
        for (ResolvedModule module : BuiltModules.resolve(BOUNDS).modules()) {
            needed.add(module.name());
        }
        assertTrue(needed.containsAll(PUBLISHED), needed::toString);
        needed.removeAll(PUBLISHED);
        needed.remove(OJALGO);
        needed.removeIf(module -> module.startsWith("org.apache.commons.numbers."));
        assertEquals(Set.of(), needed, "further modules needed at run time");
    }
}
