package org.minorant.study;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.ArrayList;
import java.util.List;

/**
 * The directory that results go to. It is made if missing. A file of a result's name is replaced, in one move once the new one is complete;
 * nothing else in the directory is touched, and nothing is deleted, so charts of names that the study no longer has stay.
 */
final class Outputs {

    /** What a result is called while it is being written. */
    private static final String PART = ".part";

    private final Path study;
    private final Path directory;
    private final List<Path> written = new ArrayList<>();

    /** Makes the directory if it is missing. */
    Outputs(Path study, Path directory) {
        this.study = study;
        this.directory = directory;
        try {
            Files.createDirectories(directory);
        } catch (IOException e) {
            throw BadInputException.in(study, "the output directory " + directory + " cannot be made: " + reason(e));
        }
    }

    /** Writes a result, replacing the one of an earlier run. */
    void write(String name, String text) {
        Path file = directory.resolve(name);
        try {
            if (Files.exists(file) && Files.isSameFile(file, study)) {
                throw BadInputException.in(study, "the result " + file + " would replace the study file; rename one");
            }
            Path fresh = directory.resolve(name + PART);
            try {
                Files.writeString(fresh, text, StandardCharsets.UTF_8);
                Files.move(fresh, file, StandardCopyOption.REPLACE_EXISTING);
            } finally {
                Files.deleteIfExists(fresh);
            }
        } catch (IOException e) {
            throw BadInputException.in(study, "the result " + file + " cannot be written: " + reason(e));
        }
        written.add(file);
    }

    /** What has been written so far. */
    List<Path> written() {
        return List.copyOf(written);
    }

    /** Some exceptions of the file system have the path alone as their message. */
    private static String reason(IOException e) {
        return e.getClass().getSimpleName().replaceFirst("Exception$", "") + ", " + e.getMessage();
    }
}
