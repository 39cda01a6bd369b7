package org.minorant.tests.containment;

import static org.junit.jupiter.api.Assertions.assertTrue;

/** What is promised about widths, beyond containment. */
enum Promise {
    /** Containment only: the data need not fix the answer to relative accuracy. */
    CONTAINMENT {
        @Override
        void check(AccuracyTable table) {}
    },
    /** Half of the enclosures are narrower than 1e-12 of the value. */
    NARROW {
        @Override
        void check(AccuracyTable table) {
            double median = table.medianRelativeWidth();
            assertTrue(median < 1e-12, "the median relative width is " + median);
        }
    },
    /** Every enclosure is narrower than 1e-9 of the value. */
    RELATIVE {
        @Override
        void check(AccuracyTable table) {
            double most = table.largestRelativeWidth();
            assertTrue(most < 1e-9, "the largest relative width is " + most);
        }
    };

    abstract void check(AccuracyTable table);
}
