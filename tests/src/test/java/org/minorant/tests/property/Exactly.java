package org.minorant.tests.property;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;

/** Draws exact unitary matrices, factors with a given kind of spectrum, and channels whose Kraus operators satisfy Σ K*K = 1 exactly. */
final class Exactly {

    private final Random random;

    Exactly(long seed) {
        random = new Random(seed);
    }

    Random random() {
        return random;
    }

    /** A product of reflections 1 − 2vv* with v = ½(four phases) or (1, phase)-swaps: unitary exactly, entries k/2^layers. */
    ExactMatrix unitary(int n, int layers) {
        ExactMatrix u = ExactMatrix.identity(n);
        for (int layer = 0; layer < layers; layer++) {
            int[] order = order(n);
            ExactMatrix h = ExactMatrix.identity(n);
            if (n >= 4) {
                reflect(h, order);
            } else {
                swap(h, order);
            }
            u = h.times(u);
        }
        return u;
    }

    private void reflect(ExactMatrix h, int[] order) {
        int[] phase = new int[4];
        for (int a = 0; a < 4; a++) {
            phase[a] = random.nextInt(4);
        }
        for (int a = 0; a < 4; a++) {
            for (int b = 0; b < 4; b++) {
                int turn = Math.floorMod(phase[a] - phase[b], 4);
                double one = a == b ? 1 : 0;
                h.re()[order[a]][order[b]] = one - 0.5 * (turn == 0 ? 1 : turn == 2 ? -1 : 0);
                h.im()[order[a]][order[b]] = -0.5 * (turn == 1 ? 1 : turn == 3 ? -1 : 0);
            }
        }
    }

    private void swap(ExactMatrix h, int[] order) {
        int i = order[0];
        int j = order[order.length - 1];
        double sign = random.nextBoolean() ? 1 : -1;
        h.re()[i][i] = 0;
        h.re()[j][j] = 0;
        if (i == j) {
            h.re()[i][i] = sign;
        } else if (random.nextBoolean()) {
            h.re()[i][j] = 1;
            h.re()[j][i] = sign;
        } else {
            h.im()[i][j] = sign;
            h.re()[j][i] = 1;
        }
    }

    private int[] order(int n) {
        int[] order = new int[n];
        for (int i = 0; i < n; i++) {
            int j = random.nextInt(i + 1);
            order[i] = order[j];
            order[j] = i;
        }
        return order;
    }

    /** n rows of an isometry of up to 8 dimensions, times the roots: columns of an operator on n dimensions with that kind of spectrum, nearly. */
    ExactMatrix factor(int n, Spectrum spectrum) {
        int wide = Math.max(n, 4);
        return unitary(wide, 3)
                .rowBlock(0, n)
                .firstColumns(Math.min(wide, 1 + random.nextInt(n + 1)))
                .scaleColumnsBy(spectrum, random);
    }

    /** A full n × n unitary times the roots: XX* has exactly the squares of the roots as eigenvalues. */
    ExactMatrix spectralFactor(int n, Spectrum spectrum) {
        return unitary(n, 3).scaleColumnsBy(spectrum, random);
    }

    /** A small exact perturbation of columns. */
    ExactMatrix noise(int rows, int columns, int power) {
        ExactMatrix e = new ExactMatrix(rows, columns);
        for (int i = 0; i < rows; i++) {
            for (int j = 0; j < columns; j++) {
                e.re()[i][j] = Math.scalb(random.nextInt(17) - 8.0, power);
                e.im()[i][j] = Math.scalb(random.nextInt(17) - 8.0, power);
            }
        }
        return e;
    }

    /** Kraus operators from n to m dimensions with Σ K*K = 1 exactly: blocks of the first n columns of a unitary on m · k dimensions. */
    List<ExactMatrix> kraus(int n, int m) {
        int k = Math.max(2, (n + m - 1) / m);
        while (m * k < 4) {
            k++;
        }
        ExactMatrix isometry = unitary(m * k, 4).firstColumns(n);
        List<ExactMatrix> blocks = new ArrayList<>();
        for (int i = 0; i < k; i++) {
            blocks.add(isometry.rowBlock(i * m, m));
        }
        return blocks;
    }

    /** The columns K₁X, K₂X, … of the image Σ K XX* K*. */
    static ExactMatrix image(List<ExactMatrix> kraus, ExactMatrix x) {
        ExactMatrix all = kraus.get(0).times(x);
        for (ExactMatrix k : kraus.subList(1, kraus.size())) {
            all = all.beside(k.times(x));
        }
        return all;
    }
}
