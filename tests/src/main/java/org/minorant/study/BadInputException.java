package org.minorant.study;

import java.nio.file.Path;

/** Something the user can mend: a line of the study file, a state file, or a place to write to. Its message is one clear line. */
final class BadInputException extends RuntimeException {

    private static final long serialVersionUID = 1L;

    private BadInputException(String message) {
        super(OneLine.of(message));
    }

    /** Anything but one path as the arguments. */
    static BadInputException usage() {
        return new BadInputException("give the path of one study file, for example -Dstudy=tests/studies/demo.study");
    }

    /** A fault with no line of its own, such as a study file that cannot be read. */
    static BadInputException in(Path file, String message) {
        return new BadInputException(file + ": " + message);
    }

    /** A fault of one line of the study file, lines counted from 1. */
    static BadInputException at(Path file, int line, String message) {
        return new BadInputException(file + ":" + line + ": " + message);
    }
}
