package org.minorant.core.internal.file;

import java.io.IOException;
import java.io.InputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.BasicFileAttributes;
import org.minorant.core.InvalidInputException;

/**
 * What is being read and for whom: the place where refusals of a file are worded, and where the memory it may take is decided.
 *
 * @param asked the method that reads, and the file
 */
public record FileSource(String asked) {

    /** Parses a stream of a known size. */
    @FunctionalInterface
    public interface Parser {

        /** Returns the matrix, or refuses it with its position. */
        RawMatrix parse(InputStream in, long size, FileSource source) throws IOException;
    }

    /** The source of a call such as {@code MatrixMarket.readOperator} on a file. */
    public static FileSource of(String method, Path path) {
        return new FileSource(method + ", " + path);
    }

    /** Opens the file and parses it. Only regular files have a size to compare a declaration with; a pipe would also block. */
    public RawMatrix read(Path path, Parser parser) throws IOException {
        BasicFileAttributes a = Files.readAttributes(path, BasicFileAttributes.class);
        if (!a.isRegularFile()) {
            throw refusal("the path is not a regular file", "a file on disk", "copy the data to a file first");
        }
        try (InputStream in = Files.newInputStream(path)) {
            return parser.parse(in, a.size(), this);
        }
    }

    /** A refusal of the file as a whole. */
    public InvalidInputException refusal(String found, String limit, String cure) {
        return new InvalidInputException(asked, found, limit, cure);
    }

    /** A refusal at a line, counted from 1. */
    public InvalidInputException atLine(long line, String found, String limit, String cure) {
        return new InvalidInputException(asked + ", line " + line, found, limit, cure);
    }

    /** A refusal at a byte, counted from 0. */
    public InvalidInputException atByte(long position, String found, String limit, String cure) {
        return new InvalidInputException(asked + ", byte " + position, found, limit, cure);
    }

    /** The same refusal with the file named. */
    public InvalidInputException named(InvalidInputException e) {
        InvalidInputException n = new InvalidInputException(asked, e.found(), e.limit(), e.cure());
        n.initCause(e);
        return n;
    }

    /**
     * The largest number of entries that may be held: complex entries take 16 bytes, and an operator is copied up to three times on its way
     * to a state.
     */
    public static long entriesThatFit() {
        return Math.min(Runtime.getRuntime().maxMemory() / 64, Integer.MAX_VALUE - 8L);
    }
}
