package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.InvalidInputException;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/**
 * Products of powers of commuting pairs, A₁^⊗n₁ ⊗ A₂^⊗n₂ ⊗ … against B₁^⊗n₁ ⊗ B₂^⊗n₂ ⊗ …, for many choices of n₁, n₂, …: words of a classical channel against an output state, for example, where the n's are
 * the counts of the letters. All choices share the tables of powers.
 *
 * <p><b>Accuracy and cost.</b> As for copies of one commuting pair: a relative width of 1e-12 to 1e-10, at any depth. Of the joint types those of the factor that has most are added up beforehand, so that two factors of two
 * eigenvalues each cost some hundred terms at 10⁴ copies.
 *
 * <p>Immutable and thread-safe.
 */
public final class CommutingPowers {

    private final int most;
    private final List<Factor> factors;
    private final int dimension;

    private CommutingPowers(int most, List<Factor> factors, int dimension) {
        this.most = most;
        this.factors = factors;
        this.dimension = dimension;
    }

    /**
     * One factor, its eigenvalues, and x^k/k! of each.
     *
     * @param lnFirst logarithms of the eigenvalues of A
     * @param lnSecond of B
     * @param first tables for A
     * @param second tables for B
     * @param totalA Tr A
     * @param totalB Tr B
     * @param error a bound on the relative error of the eigenvalues
     * @param traceError of the traces
     */
    record Factor(
            double[] lnFirst,
            double[] lnSecond,
            PowerTable[] first,
            PowerTable[] second,
            WideDoubleDouble totalA,
            WideDoubleDouble totalB,
            double error,
            double traceError) {

        int letters() {
            return lnFirst.length;
        }
    }

    /**
     * Prepares the products.
     *
     * @param first eigenvalues of A₁, A₂, …, each at least 0 and finite
     * @param second eigenvalues of B₁, B₂, … to the same vectors
     * @param most the largest number of copies of one factor, at least 1
     * @return the products
     * @throws InvalidInputException if the lists are empty or differ in length, the spectra of a factor do, an eigenvalue is negative or not finite, or powers leave the range of exponents
     */
    public static CommutingPowers of(List<double[]> first, List<double[]> second, int most) {
        String asked = "CommutingPowers.of";
        if (first.isEmpty() || first.size() != second.size() || most < 1) {
            throw new InvalidInputException(
                    asked,
                    first.size() + " and " + second.size() + " spectra with up to " + most + " copies",
                    "as many of each, and at least 1 copy",
                    "give two spectra for every factor");
        }
        List<Factor> factors = new ArrayList<>();
        int dimension = 1;
        for (int x = 0; x < first.size(); x++) {
            // validates
            PositivePair pair = PositivePair.ofSpectra(first.get(x), second.get(x));
            dimension = Math.max(dimension, pair.dimension());
            factors.add(factor(first.get(x), second.get(x), most));
        }
        return new CommutingPowers(most, List.copyOf(factors), dimension);
    }

    private static Factor factor(double[] a, double[] b, int most) {
        Letters letters = Letters.ofSpectra(a, b);
        List<WideDoubleDouble> all = new ArrayList<>(letters.first());
        all.addAll(letters.second());
        Letters.checkCopies(most, all);
        int k = letters.count();
        double[] lnFirst = new double[k];
        double[] lnSecond = new double[k];
        PowerTable[] x = new PowerTable[k];
        PowerTable[] y = new PowerTable[k];
        for (int i = 0; i < k; i++) {
            lnFirst[i] = Letters.ln(letters.first().get(i));
            lnSecond[i] = Letters.ln(letters.second().get(i));
            x[i] = PowerTable.scaledPowers(letters.first().get(i), 0, most);
            y[i] = PowerTable.scaledPowers(letters.second().get(i), 0, most);
        }
        return new Factor(
                lnFirst, lnSecond, x, y, total(a), total(b), letters.relativeError(), a.length * DoubleDouble.EPS);
    }

    private static WideDoubleDouble total(double[] a) {
        WideDoubleDouble s = WideDoubleDouble.ZERO;
        for (double v : a) {
            s = v > 0 ? Letters.sum(s, Letters.wide(v)) : s;
        }
        return s;
    }

    /**
     * Returns one product.
     *
     * @param copies n₁, n₂, …, one for each factor, each at least 0, not all 0
     * @return the pair
     * @throws InvalidInputException if there are not as many numbers as factors, one is negative or beyond the largest prepared, or all are 0
     */
    public PositivePair pair(int... copies) {
        long sum = 0;
        boolean valid = copies.length == factors.size();
        for (int n : copies) {
            valid &= n >= 0 && n <= most;
            sum += n;
        }
        if (!valid || sum < 1 || sum > Integer.MAX_VALUE) {
            throw new InvalidInputException(
                    "CommutingPowers.pair",
                    "the numbers of copies are " + java.util.Arrays.toString(copies),
                    factors.size() + " of them, each between 0 and " + most + ", at least one above 0",
                    "give a number of copies for every factor");
        }
        return new CommutingProducts(factors, copies.clone(), dimension, Effort.DEFAULT);
    }

    /**
     * Returns about how many terms a value of {@link #pair} adds up.
     *
     * @param copies n₁, n₂, …, one for each factor
     * @return the number of terms; an estimate
     */
    public double terms(int... copies) {
        double sum = 0;
        double product = 1;
        double widest = 1;
        for (int x = 0; x < copies.length; x++) {
            double types = types(copies[x], factors.get(x).letters());
            sum += types;
            product *= types;
            widest = Math.max(widest, types);
        }
        return sum + product / widest;
    }

    /** The types of a factor in windows of some twenty standard deviations, or all. */
    private static double types(int n, int letters) {
        double window = Math.min(n + 1.0, 10 * Math.sqrt(n) + 20);
        double box = Math.pow(window, Math.max(0, letters - 1));
        double all = 1;
        for (int i = 1; i < letters; i++) {
            all *= (n + i) / (double) i;
        }
        return Math.min(box, all);
    }
}
