package org.minorant.core;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalInt;
import org.minorant.core.internal.message.Checks;

/**
 * Entries of Σ w_i A_i, summed in double-double and rounded once, with their distance from the operator meant.
 *
 * <p><b>Error.</b> With k summands the double-double sum is within k(k+8)·2^-104·Σw|a| of the exact one, entry by entry (low words are summed plainly),
 * and rounding it to double costs 2^-53 of it; each operation may lose 2^-1074 to underflow; the trace norm is at most √n times the Frobenius norm. What the entries of the A_i differ
 * from the operators meant enters with its weight.
 */
final class WeightedSum {

    private WeightedSum() {}

    static PositiveOperator of(String asked, List<? extends PositiveOperator> operators, double[] weights) {
        check(asked, operators, weights);
        List<PositiveOperator> terms = List.copyOf(operators);
        double[] w = weights.clone();
        int n = terms.get(0).rows();
        boolean real = terms.stream().allMatch(Operator::isReal);
        double[] size = new double[n * n];
        double[] re = part(terms, w, true, size);
        double[] im = real ? new double[0] : part(terms, w, false, size);
        double frobenius = 0;
        double most = 0;
        for (double v : size) {
            most = Math.max(most, v);
        }
        for (double v : size) {
            double r = most == 0 ? 0 : v / most;
            frobenius += r * r;
        }
        frobenius = Math.sqrt(frobenius) * most;
        double defect = Math.sqrt(n) * (0x1p-53 + w.length * (w.length + 8.0) * 0x1p-104) * frobenius
                + n * Math.sqrt(n) * (w.length + 1) * 0x1p-1072;
        for (int t = 0; t < w.length; t++) {
            defect += w[t] * terms.get(t).entryDefect() + Double.MIN_VALUE;
        }
        return new PositiveOperator(
                new Operator(n, n, Checks.finite(asked, re), Checks.finite(asked, im)),
                defect * (1 + (w.length + (double) n * n) * 0x1p-51),
                FactorSource.later(() -> factor(terms, w), columns(terms, w)));
    }

    private static OptionalInt columns(List<PositiveOperator> terms, double[] w) {
        int sum = 0;
        for (int t = 0; t < w.length; t++) {
            if (w[t] > 0) {
                OptionalInt c = terms.get(t).knownColumns();
                if (c.isEmpty()) {
                    return c;
                }
                sum += c.getAsInt();
            }
        }
        return OptionalInt.of(Math.max(sum, 1));
    }

    private static PositiveFactor factor(List<PositiveOperator> terms, double[] w) {
        List<PositiveFactor> parts = new ArrayList<>();
        for (int t = 0; t < w.length; t++) {
            if (w[t] > 0) {
                parts.add(FactorSums.scaled(terms.get(t).factor(), w[t]));
            }
        }
        return parts.isEmpty() ? FactorSums.scaled(terms.get(0).factor(), 0) : FactorSums.stacked(parts);
    }

    /** The real or imaginary part of the sum; adds Σ w|part| to size, which bounds Σ w|a| from above. */
    private static double[] part(List<PositiveOperator> terms, double[] w, boolean real, double[] size) {
        int length = size.length;
        double[] hi = new double[length];
        double[] lo = new double[length];
        for (int t = 0; t < w.length; t++) {
            double[] a = real ? terms.get(t).realParts() : terms.get(t).imaginaryParts();
            for (int e = 0; e < a.length; e++) {
                double p = w[t] * a[e];
                double tail = Math.fma(w[t], a[e], -p);
                double s = hi[e] + p;
                double b = s - hi[e];
                lo[e] += (hi[e] - (s - b)) + (p - b) + tail;
                hi[e] = s;
                size[e] += Math.abs(p);
            }
        }
        for (int e = 0; e < length; e++) {
            hi[e] += lo[e];
        }
        return hi;
    }

    private static void check(String asked, List<? extends PositiveOperator> operators, double[] weights) {
        if (operators.isEmpty() || operators.size() != weights.length) {
            throw new InvalidInputException(
                    asked,
                    operators.size() + " operators and " + weights.length + " weights",
                    "as many of each, at least 1",
                    "give one weight per operator");
        }
        for (int t = 0; t < weights.length; t++) {
            Checks.inRange(asked, "weight " + t, weights[t], 0, Double.MAX_VALUE);
            Checks.equalShapes(asked, operators.get(0), operators.get(t));
        }
    }
}
