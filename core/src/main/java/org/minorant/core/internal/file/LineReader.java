package org.minorant.core.internal.file;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;

/** Lines of a text file, each at most 1024 characters as the format says, with their number and the bytes read so far. */
final class LineReader {

    /** The format limits lines to this many characters; more would let one line take any memory. */
    static final int LONGEST = 1024;

    private final InputStream in;
    private final FileSource source;
    private final byte[] buffer = new byte[1 << 16];
    private final byte[] line = new byte[LONGEST];
    private int next;
    private int filled;
    private long number;
    private long consumed;
    private boolean ended;

    LineReader(InputStream in, FileSource source) {
        this.in = in;
        this.source = source;
    }

    /** The number of the line last returned, from 1. */
    long number() {
        return number;
    }

    /** The bytes up to the end of the line last returned. */
    long consumed() {
        return consumed;
    }

    /** Whether the end of the file has been met; {@link #nextLine} then returned what was before it. */
    boolean isAtEnd() throws IOException {
        return ended || (next == filled && !fill());
    }

    /** The next line without its end; not to be called at the end of the file. */
    String nextLine() throws IOException {
        number++;
        int length = 0;
        while (next < filled || fill()) {
            byte b = buffer[next++];
            consumed++;
            if (b == '\n') {
                break;
            }
            if (length == LONGEST) {
                throw source.atLine(
                        number,
                        "the line is longer than " + LONGEST + " characters",
                        "at most " + LONGEST,
                        "check that this is a Matrix Market text file");
            }
            line[length++] = b;
        }
        if (length > 0 && line[length - 1] == '\r') {
            length--;
        }
        return new String(line, 0, length, StandardCharsets.ISO_8859_1);
    }

    private boolean fill() throws IOException {
        next = 0;
        filled = Math.max(0, in.read(buffer));
        ended = filled == 0;
        return !ended;
    }
}
