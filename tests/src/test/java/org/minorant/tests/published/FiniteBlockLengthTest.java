package org.minorant.tests.published;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.minorant.bounds.BlockLength;
import org.minorant.bounds.ClassicalQuantumChannel;
import org.minorant.bounds.CodingBounds;
import org.minorant.bounds.WholeUnit;
import org.minorant.core.Information;

/**
 * The binary symmetric channel of crossover 0.11 and the erasure channel ½ at finite block length, error 1e-3.
 *
 * <p>Block lengths: Y. Polyanskiy, H. V. Poor, S. Verdú, IEEE Trans. Inf. Theory 56, 2307 (2010), from memory. Messages: computed by an independent program, from binomial sums.
 */
class FiniteBlockLengthTest {

    private static final double ERROR = 1e-3;

    private static final CodingBounds SYMMETRIC =
            CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.89, 0.11}, {0.11, 0.89}}));

    private static final CodingBounds ERASURE =
            CodingBounds.of(ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{0.5, 0.5, 0}, {0, 0.5, 0.5}}));

    @ParameterizedTest
    @CsvSource({
        "100, 28.173526, 25.440813, 17.054747, 16.054758",
        "500, 193.278493, 190.962001, 181.064659, 180.064659",
        "1000, 416.835834, 414.474552, 404.056651, 403.056651",
        "2000, 879.434111, 876.471036, 865.635303, 864.635303"
    })
    void messagesOfTheSymmetricChannel(int n, String converse, String union, String dependence, String f) {
        CodingBounds bounds = SYMMETRIC.uses(n);
        // 1 - 0.11 rounded: a relative 2^-53 in each use
        double rounding = n * 0x1p-50;
        Printed.of(converse).isIn(bounds.converse(ERROR).bits(), rounding);
        Printed.of(union).isIn(bounds.randomCodingUnion(ERROR).bits(), rounding);
        Printed.of(dependence).isIn(bounds.dependenceTesting(ERROR).bits(), rounding);
        Printed.of(f).isIn(bounds.achievable(ERROR).bits(), rounding);
        assertTrue(bounds.randomCodingUnion(ERROR).bits().width() < 1e-6);
        assertTrue(bounds.converse(ERROR).bits().width() < 1e-6);
    }

    /**
     * 90 % of capacity in whole bits. Published: random-coding union 3106, as here. The published converse, 2985, compares real numbers of bits: every n up to 2985 is excluded there, and 2986 is not, which is the same to within the
     * use that "needed" and "not enough" differ by. In whole bits the converse excludes up to 2994.
     */
    @Test
    void blockLengthOfTheSymmetricChannel() {
        BlockLength n = SYMMETRIC.blockLengthFor(0.9, ERROR, WholeUnit.BITS);
        assertEquals(3106, n.sure());
        assertTrue(n.achievability().name().contains("union"));
        assertEquals(2995, n.impossibleBefore());
        double rate = 0.9 * SYMMETRIC.channel().capacity().value().bits().midpoint();
        assertTrue(SYMMETRIC.uses(2985).converse(ERROR).bits().upper() < 2985 * rate);
        assertTrue(SYMMETRIC.uses(2986).converse(ERROR).bits().lower() > 2986 * rate);
    }

    /** Published: 3548 by dependence testing, in whole bits, as here. */
    @Test
    void dependenceTestingLengthOfTheSymmetricChannel() {
        double rate = 0.9 * SYMMETRIC.channel().capacity().value().bits().midpoint();
        assertTrue(isTested(SYMMETRIC, 3548, Math.ceil(3548 * rate)));
        for (int n = 3500; n < 3548; n++) {
            assertTrue(!isTested(SYMMETRIC, n, Math.ceil(n * rate)), "n = " + n);
        }
    }

    private static boolean isTested(CodingBounds channel, int n, double bits) {
        return channel.uses(n).dependenceTestingError(Information.ofBits(bits)).upper() <= ERROR;
    }

    /**
     * Rate 0.45: 991 by dependence testing and 1021 by the random-coding union, both from memory. 991 comes out in whole bits, 1021 with 2^(0.45n) messages, not rounded. The two differ by one bit at any n, as all ties count as errors in the latter:
     * counted alike, they are 991 and 1031 in whole bits, 981 and 1021 in messages. One bit is 40 uses here.
     */
    @Test
    void blockLengthsOfTheErasureChannel() {
        for (int n = 961; n <= 991; n++) {
            assertEquals(n == 991, isTested(ERASURE, n, Math.ceil(0.45 * n - 1e-9)), "n = " + n);
        }
        for (int n = 1001; n <= 1021; n++) {
            boolean isEnough = ERASURE.uses(n)
                            .randomCodingUnionError(Information.ofBits(0.45 * n))
                            .upper()
                    <= ERROR;
            assertEquals(n == 1021, isEnough, "n = " + n);
        }
        BlockLength n = ERASURE.blockLengthFor(0.9, ERROR);
        assertEquals(981, n.sure());
        assertTrue(n.achievability().name().contains("dependence testing"));
    }
}
