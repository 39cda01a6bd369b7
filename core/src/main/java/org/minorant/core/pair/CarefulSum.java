package org.minorant.core.pair;

/** A sum of non-negative doubles that carries its rounding errors: relative error 2^-53 + (m 2^-53)² for m terms (see {@link LineSum}). */
final class CarefulSum {

    private double sum;
    private double carried;

    void add(double term) {
        double t = sum + term;
        double z = t - sum;
        carried += (sum - (t - z)) + (term - z);
        sum = t;
    }

    double value() {
        return sum + carried;
    }
}
