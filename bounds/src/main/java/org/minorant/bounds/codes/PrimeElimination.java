package org.minorant.bounds.codes;

import java.util.ArrayList;
import java.util.List;

/** Which of some vectors over a field are independent over the prime field in it: elimination modulo p on their digits. */
final class PrimeElimination {

    private PrimeElimination() {}

    /**
     * Keeps the vectors that are not combinations of those before.
     *
     * @param vectors vectors over the field, of one length
     * @param field the field
     * @return the independent ones in order
     */
    static int[][] independent(int[][] vectors, FiniteField field) {
        List<int[]> kept = new ArrayList<>();
        List<int[]> reduced = new ArrayList<>();
        List<Integer> leads = new ArrayList<>();
        int p = field.characteristic();
        for (int[] v : vectors) {
            int[] digits = digits(v, field);
            for (int k = 0; k < reduced.size(); k++) {
                subtract(digits, digits[leads.get(k)], reduced.get(k), p);
            }
            int lead = 0;
            while (lead < digits.length && digits[lead] == 0) {
                lead++;
            }
            if (lead < digits.length) {
                scaleToOne(digits, lead, p);
                reduced.add(digits);
                leads.add(lead);
                kept.add(v);
            }
        }
        return kept.toArray(int[][]::new);
    }

    private static int[] digits(int[] v, FiniteField field) {
        int p = field.characteristic();
        int r = 0;
        for (int q = 1; q < field.size(); q *= p) {
            r++;
        }
        int[] out = new int[v.length * r];
        for (int j = 0; j < v.length; j++) {
            for (int i = 0, rest = v[j]; i < r; i++, rest /= p) {
                out[j * r + i] = rest % p;
            }
        }
        return out;
    }

    private static void subtract(int[] from, int factor, int[] row, int p) {
        for (int i = 0; i < from.length && factor != 0; i++) {
            from[i] = Math.floorMod(from[i] - factor * row[i], p);
        }
    }

    private static void scaleToOne(int[] row, int lead, int p) {
        int inverse = 1;
        while (inverse * row[lead] % p != 1) {
            inverse++;
        }
        for (int i = 0; i < row.length; i++) {
            row[i] = row[i] * inverse % p;
        }
    }
}
