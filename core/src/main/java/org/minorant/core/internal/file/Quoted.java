package org.minorant.core.internal.file;

/** A piece of a file fit for a message: short, printable, quoted. */
final class Quoted {

    private static final int SHOWN = 40;

    private Quoted() {}

    static String of(String text) {
        StringBuilder b = new StringBuilder("\"");
        for (int i = 0; i < Math.min(text.length(), SHOWN); i++) {
            char c = text.charAt(i);
            b.append(c >= ' ' && c < 0x7f ? c : '?');
        }
        return b.append(text.length() > SHOWN ? "..." : "").append('"').toString();
    }
}
