package org.minorant.architecture;

import java.io.File;
import java.lang.module.Configuration;
import java.lang.module.ModuleDescriptor;
import java.lang.module.ModuleFinder;
import java.lang.module.ModuleReference;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;

/**
 * The modules that the build made, read from where it put them.
 *
 * <p>The tests of this module run on the class path, where a module's descriptor is only a file; here it is read as one.
 */
final class BuiltModules {
    static final String CORE = "org.minorant.core";
    static final String MEASUREMENT = "org.minorant.measurement";
    static final String BOUNDS = "org.minorant.bounds";
    static final List<String> PUBLISHED = List.of(CORE, MEASUREMENT, BOUNDS);

    /** Every entry of the class path that declares a module of its own; a name derived from a file name is none. */
    private static final List<Path> MODULE_PATH = Arrays.stream(
                    System.getProperty("java.class.path").split(File.pathSeparator))
            .map(Path::of)
            .filter(Files::exists)
            .filter(BuiltModules::declaresModule)
            .toList();

    private BuiltModules() {}

    private static boolean declaresModule(Path entry) {
        try {
            return ModuleFinder.of(entry).findAll().stream()
                    .anyMatch(module -> !module.descriptor().isAutomatic());
        } catch (java.lang.module.FindException noValidName) {
            return false;
        }
    }

    static ModuleFinder finder() {
        return ModuleFinder.of(MODULE_PATH.toArray(Path[]::new));
    }

    /** As the {@code --module-path} of a tool. */
    static String modulePath() {
        return MODULE_PATH.stream().map(Path::toString).collect(Collectors.joining(File.pathSeparator));
    }

    static ModuleReference reference(String name) {
        return finder().find(name).orElseThrow(() -> new AssertionError(name + " is not among " + MODULE_PATH));
    }

    static ModuleDescriptor descriptor(String name) {
        return reference(name).descriptor();
    }

    /** Where a module's classes lie: a directory or a jar. */
    static Path location(String name) {
        return Path.of(reference(name).location().orElseThrow());
    }

    /** The packages of all published modules that a user can reach. */
    static Set<String> exportedPackages() {
        return PUBLISHED.stream()
                .flatMap(name -> descriptor(name).exports().stream())
                .map(ModuleDescriptor.Exports::source)
                .collect(Collectors.toSet());
    }

    /** What a program needs on its module path to use one module: everything it reads, directly or not. */
    static Configuration resolve(String name) {
        return ModuleLayer.boot().configuration().resolve(finder(), ModuleFinder.of(), Set.of(name));
    }
}
