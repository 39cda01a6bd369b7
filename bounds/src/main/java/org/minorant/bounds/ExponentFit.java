package org.minorant.bounds;

import java.util.Map;
import java.util.SortedMap;
import java.util.TreeMap;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.measurement.HypothesisPair;

/**
 * How the exact error of n copies falls: −ln P_e ≈ n C + γ ln n + c, with C the Chernoff divergence.
 *
 * <p>C is certified and not fitted. γ and c are estimates: the least-squares fit to the exact values that were given, of which nothing is promised between or beyond them. As terms of order 1/n are left out, large n
 * give the better fit. For commuting states γ is ½ (R. R. Bahadur, R. R. Rao, Ann. Math. Statist. 31, 1015, 1960, from memory; c then oscillates with n if the likelihood ratio lies on a lattice); for kets it is 0.
 *
 * @param exponent C, in nats
 * @param power γ, the estimated power of n
 * @param constant c, the estimated constant
 * @param largestResidual the largest |−ln P_e − (n C + γ ln n + c)| over the values fitted
 */
public record ExponentFit(Information exponent, double power, double constant, double largestResidual) {

    /**
     * Fits the exact errors of some numbers of copies.
     *
     * @param pair two states; of a pair of copies, those about one copy
     * @param prior p, the prior of the first state, strictly between 0 and 1
     * @param copies at least two different numbers of copies
     * @return the fit
     * @throws InvalidInputException if a number is out of range, the pair has no states, or n copies have no exact form that fits
     */
    public static ExponentFit of(HypothesisPair pair, double prior, int... copies) {
        HypothesisPair one = pair.single();
        TreeMap<Integer, Enclosure> errors = new TreeMap<>();
        for (int n : copies) {
            errors.put(n, one.copies(n).minimumError(prior));
        }
        return of(Divergences.chernoff(one.first(), one.second()).value(), errors);
    }

    /**
     * Fits errors that are at hand already.
     *
     * @param exponent the Chernoff divergence C
     * @param errors the minimum error by number of copies, at least two, all above 0
     * @return the fit
     * @throws InvalidInputException if there are fewer than two errors, one may vanish, or C is infinite
     */
    public static ExponentFit of(Information exponent, SortedMap<Integer, Enclosure> errors) {
        int count = errors.size();
        if (count < 2) {
            throw refuse("there are " + count + " errors", "at least 2", "give more numbers of copies");
        }
        double rate = exponent.nats().midpoint();
        if (!(rate < Double.POSITIVE_INFINITY)) {
            throw refuse("the exponent is infinite", "a finite one", "orthogonal states need no fit");
        }
        double[] x = new double[count];
        double[] y = new double[count];
        int i = 0;
        for (Map.Entry<Integer, Enclosure> e : errors.entrySet()) {
            double ln = 0.5 * (e.getValue().lnLower() + e.getValue().lnUpper());
            if (!Double.isFinite(ln)) {
                throw refuse(
                        "the error of " + e.getKey() + " copies is " + e.getValue(),
                        "an error above 0",
                        "leave that number out");
            }
            x[i] = Math.log(e.getKey());
            y[i++] = -ln - e.getKey() * rate;
        }
        double meanX = mean(x);
        double meanY = mean(y);
        double xx = 0;
        double xy = 0;
        for (int k = 0; k < count; k++) {
            xx += (x[k] - meanX) * (x[k] - meanX);
            xy += (x[k] - meanX) * (y[k] - meanY);
        }
        double power = xy / xx;
        double constant = meanY - power * meanX;
        double worst = 0;
        for (int k = 0; k < count; k++) {
            worst = Math.max(worst, Math.abs(y[k] - power * x[k] - constant));
        }
        return new ExponentFit(exponent, power, constant, worst);
    }

    /**
     * Returns what the fit says of a number of copies.
     *
     * @param n the number of copies, at least 1
     * @return an approximation of ln P_e
     */
    public double lnError(int n) {
        return -(n * exponent.nats().midpoint() + power * Math.log(n) + constant);
    }

    private static double mean(double[] x) {
        double sum = 0;
        for (double v : x) {
            sum += v;
        }
        return sum / x.length;
    }

    private static InvalidInputException refuse(String found, String limit, String cure) {
        return new InvalidInputException("ExponentFit.of", found, limit, cure);
    }
}
