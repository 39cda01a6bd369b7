package org.minorant.bounds;

/**
 * First and second derivatives of the mutual information at a distribution.
 *
 * @param divergences D(W_x‖ρ_P), one for each letter: the gradient plus one
 * @param curvature minus the Hessian, positive semidefinite
 */
record Slope(double[] divergences, double[][] curvature) {

    /** The same for some letters only. */
    Slope restricted(int[] letters) {
        double[] d = new double[letters.length];
        double[][] c = new double[letters.length][letters.length];
        for (int x = 0; x < letters.length; x++) {
            d[x] = divergences[letters[x]];
            for (int z = 0; z < letters.length; z++) {
                c[x][z] = curvature[letters[x]][letters[z]];
            }
        }
        return new Slope(d, c);
    }

    /** Σ P(x) D(W_x‖ρ_P), the mutual information. */
    double mean(double[] p) {
        double s = 0;
        for (int x = 0; x < p.length; x++) {
            s += p[x] == 0 ? 0 : p[x] * divergences[x];
        }
        return s;
    }

    /** max D(W_x‖ρ_P) − mutual information: what is left to gain at most. */
    double gap(double[] p) {
        double most = Double.NEGATIVE_INFINITY;
        for (double d : divergences) {
            most = Math.max(most, d);
        }
        return most - mean(p);
    }
}
