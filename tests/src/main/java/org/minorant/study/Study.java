package org.minorant.study;

import java.io.PrintStream;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.List;
import java.util.function.LongSupplier;

/**
 * The command: reads one study file, prints the report on standard output, writes it with its numbers and charts to the output directory.
 *
 * <p>Progress and faults go to standard error. The exit status is 0 if all is done, 2 if the input or the output place has to be mended, with one line
 * that says where, and 1 for an error in this program.
 */
public final class Study {

    private Study() {}

    /**
     * Runs a study and ends the virtual machine with its exit status, unless that is 0.
     *
     * @param arguments the path of the study file, alone
     */
    public static void main(String[] arguments) {
        // charts are drawn into files; no display may be asked for
        System.setProperty("java.awt.headless", "true");
        Exit exit = run(List.of(arguments), System.out, System.err, System::nanoTime);
        if (exit != Exit.DONE) {
            System.exit(exit.status());
        }
    }

    /** Runs a study with streams and a clock of the caller's. */
    static Exit run(List<String> arguments, PrintStream out, PrintStream err, LongSupplier nanoseconds) {
        try {
            Progress progress = new Progress(nanoseconds, err::println);
            try (ProgressTimer timer = new ProgressTimer(progress)) {
                timer.start();
                StudyRun.of(path(arguments), progress).report(out);
            }
            return Exit.DONE;
        } catch (BadInputException e) {
            err.println(e.getMessage());
            return Exit.BAD_INPUT;
        } catch (OutOfMemoryError e) {
            err.println("the study does not fit in memory; give Java more, for example MAVEN_OPTS=-Xmx8g");
            return Exit.BAD_INPUT;
        } catch (RuntimeException | StackOverflowError e) {
            err.println("internal error, please report it with the study file and its states: " + e);
            e.printStackTrace(err);
            return Exit.INTERNAL;
        }
    }

    private static Path path(List<String> arguments) {
        if (arguments.size() != 1 || arguments.get(0).isBlank()) {
            throw BadInputException.usage();
        }
        try {
            return Path.of(arguments.get(0));
        } catch (InvalidPathException e) {
            throw BadInputException.usage();
        }
    }
}
