package org.minorant.study;

/** Makes any text safe to print on one line of a terminal. */
final class OneLine {

    /** Longer texts are cut: a message may quote a line of a hostile file. */
    private static final int LONGEST = 600;

    private OneLine() {}

    /** The text with every control character and line break replaced by a space, cut at 600 characters. */
    static String of(String text) {
        String flat = text.replaceAll("[\\p{Cntrl}\\p{Cf}\\u2028\\u2029]+", " ").strip();
        return flat.length() <= LONGEST ? flat : flat.substring(0, LONGEST) + "...";
    }

    /** A word of the user's in quotes, shortened so that the rest of the message stays in sight. */
    static String quote(String word) {
        return "'" + (word.length() <= 60 ? word : word.substring(0, 60) + "...") + "'";
    }
}
