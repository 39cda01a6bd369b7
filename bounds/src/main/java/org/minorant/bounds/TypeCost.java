package org.minorant.bounds;

/** What one type of words costs, and so how many are asked for one after the other. */
enum TypeCost {

    /** Classical letters: sums. */
    SUMS(20_001, 2001, 60, 0.25, 0.5, 1, 2),

    /** Kets: one scalar equation, about a millisecond. */
    EQUATIONS(2001, 201, 60, 0.5, 1),

    /** Mixed letters: blocks or matrices, which may take seconds. */
    BLOCKS(33, 4, 8, 1);

    private final int most;
    private final int mostInLedger;
    private final int few;
    private final double[] sizes;

    TypeCost(int most, int mostInLedger, int few, double... sizes) {
        this.most = most;
        this.mostInLedger = mostInLedger;
        this.few = few;
        this.sizes = sizes;
    }

    /** How many types may be asked for. */
    int most() {
        return most;
    }

    /** How many where nobody asked for this bound in particular. */
    int mostInLedger() {
        return mostInLedger;
    }

    /** Up to how many types a search may go through all of them many times. */
    int few() {
        return few;
    }

    /** Which sizes of groups of types are tried, in standard deviations √n. */
    double[] sizes() {
        return sizes.clone();
    }
}
