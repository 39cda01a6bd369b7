package org.minorant.study;

/** Exit statuses of the runner. */
enum Exit {
    /** Report, numbers and charts are complete. */
    DONE(0),
    /** Something in this program or in the library went wrong; the user cannot mend it. */
    INTERNAL(1),
    /** The study file, a state file or a place to write to has to be mended; standard error says in one line what and where. */
    BAD_INPUT(2);

    private final int status;

    Exit(int status) {
        this.status = status;
    }

    int status() {
        return status;
    }
}
