package org.minorant.bounds.codes;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * The different words of a codebook, in order of appearance, with the number μ of messages that share each, and the columns of their states.
 *
 * <p>With Z = (√μ_w X_w) over different words and H = (Z*Z)^½, the pretty-good measurement of M equally likely messages names the right word of w with joint probability ‖H_ww‖²/M, and each message of
 * the word equally often. So the average error is 1/M times
 *
 * <pre>Σ_{v≠w} ‖H_vw‖² + Σ_w (1 − 1/μ_w) ‖H_ww‖².</pre>
 */
final class WordColumns {

    private final List<int[]> words;
    private final int[] shared;
    private final int messages;
    private final LetterColumns letters;

    private WordColumns(List<int[]> words, int[] shared, int messages, LetterColumns letters) {
        this.words = words;
        this.shared = shared;
        this.messages = messages;
        this.letters = letters;
    }

    static WordColumns of(Codebook code, LetterColumns letters) {
        Map<Word, Integer> counts = new LinkedHashMap<>();
        for (int[] w : code.words()) {
            counts.merge(new Word(w), 1, Integer::sum);
        }
        List<int[]> words = counts.keySet().stream().map(Word::letters).toList();
        int[] shared = counts.values().stream().mapToInt(Integer::intValue).toArray();
        return new WordColumns(words, shared, code.messages(), letters);
    }

    /** An array with the equality of its entries. */
    private record Word(int[] letters) {
        @Override
        public boolean equals(Object o) {
            return o instanceof Word other && Arrays.equals(letters, other.letters);
        }

        @Override
        public int hashCode() {
            return Arrays.hashCode(letters);
        }
    }

    /** The number of different words. */
    int size() {
        return words.size();
    }

    int messages() {
        return messages;
    }

    int length() {
        return words.get(0).length;
    }

    int[] word(int w) {
        return words.get(w);
    }

    /** μ. */
    int shared(int w) {
        return shared[w];
    }

    LetterColumns letters() {
        return letters;
    }

    /** The number of columns of a word; as a double, it may be large. */
    double rank(int w) {
        double r = 1;
        for (int x : words.get(w)) {
            r *= letters.rank(x);
        }
        return r;
    }

    /** The number of columns of all words together. */
    double count() {
        double c = 0;
        for (int w = 0; w < size(); w++) {
            c += rank(w);
        }
        return c;
    }

    /** For each column its word. */
    int[] owners() {
        int[] owners = new int[(int) count()];
        int at = 0;
        for (int w = 0; w < size(); w++) {
            int r = (int) rank(w);
            Arrays.fill(owners, at, at + r, w);
            at += r;
        }
        return owners;
    }

    /** For each column and position the column of the letter there. */
    int[][] columns() {
        List<int[]> out = new ArrayList<>();
        for (int[] w : words) {
            int[] c = new int[w.length];
            do {
                int[] column = new int[w.length];
                Arrays.setAll(column, j -> letters.offset(w[j]) + c[j]);
                out.add(column);
            } while (next(c, w));
        }
        return out.toArray(int[][]::new);
    }

    private boolean next(int[] c, int[] w) {
        for (int j = c.length - 1; j >= 0; j--) {
            if (++c[j] < letters.rank(w[j])) {
                return true;
            }
            c[j] = 0;
        }
        return false;
    }
}
