package org.minorant.study;

import java.io.IOException;
import java.io.InputStream;
import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.List;

/** Reads the lines of a study file: UTF-8, with or without byte order mark, any line ends, at most 1 MiB. */
final class StudyText {

    /** A study file is a page or two; anything near this size is another kind of file. */
    static final int MOST_BYTES = 1 << 20;

    private StudyText() {}

    /** The lines without their ends. */
    static List<String> lines(Path file) {
        String text = decode(file, bytes(file));
        return List.of(text.split("\r\n|\r|\n", -1));
    }

    private static byte[] bytes(Path file) {
        if (Files.isDirectory(file)) {
            throw BadInputException.in(file, "is a directory; give the study file itself");
        }
        try (InputStream in = Files.newInputStream(file)) {
            byte[] bytes = in.readNBytes(MOST_BYTES + 1);
            if (bytes.length > MOST_BYTES) {
                throw BadInputException.in(
                        file, "is longer than " + MOST_BYTES + " bytes, so it is hardly a study file; name one");
            }
            return bytes;
        } catch (NoSuchFileException e) {
            throw BadInputException.in(file, "no such file; give the path of a study file");
        } catch (AccessDeniedException e) {
            throw BadInputException.in(file, "may not be read; check its permissions");
        } catch (IOException e) {
            throw BadInputException.in(file, "cannot be read: " + e.getMessage());
        }
    }

    /** Bytes that are no UTF-8 are refused with their line: a binary file must not be taken for an odd study. */
    private static String decode(Path file, byte[] bytes) {
        int start = bytes.length >= 3 && bytes[0] == (byte) 0xEF && bytes[1] == (byte) 0xBB && bytes[2] == (byte) 0xBF
                ? 3
                : 0;
        ByteBuffer rest = ByteBuffer.wrap(bytes, start, bytes.length - start);
        try {
            return StandardCharsets.UTF_8.newDecoder().decode(rest).toString();
        } catch (CharacterCodingException e) {
            // The decoder stops in front of the bad byte.
            int line = 1;
            for (int i = 0; i < rest.position(); i++) {
                line += bytes[i] == '\n' ? 1 : 0;
            }
            throw BadInputException.at(
                    file,
                    line,
                    "byte " + (rest.position() + 1) + " of the file is not UTF-8 text; save the file as UTF-8");
        }
    }
}
