package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** Exponents where closed forms are known. */
final class ErrorExponentsTest {

    private static final ClassicalQuantumChannel KETS = ClassicalQuantumChannel.of(
            DensityOperator.ofKet(Channels.ket(0.78, false)), DensityOperator.ofKet(Channels.ket(0.78, true)));

    private static final double P = 0.11;

    private static final ClassicalQuantumChannel SYMMETRIC =
            ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1 - P, P}, {P, 1 - P}});

    private static ErrorExponents kets(double bits) {
        return ErrorExponents.of(KETS, Information.ofBits(bits));
    }

    private static void assertHolds(double expected, Enclosure actual, double tolerance) {
        assertTrue(actual.widen(tolerance).contains(expected), () -> expected + " " + actual.toIntervalString(17));
        assertTrue(actual.width() < 1e-9, () -> actual.toIntervalString(17));
    }

    /** Computed by an independent program from the closed form of two kets, eigenvalues (1 ± 0.78)/2; ten digits. */
    @ParameterizedTest
    @CsvSource({"0.1, 0.2143737587", "0.2, 0.1143737587", "0.3, 0.0408976453", "0.4, 0.0089299559"})
    void randomCodingOfTwoKets(double bits, double expected) {
        Exponent e = kets(bits).randomCoding();
        assertHolds(expected, e.bits(), 5.1e-11);
        assertEquals(Standing.PROVEN, e.standing());
        assertTrue(e.theorem().source().contains("Burnashev"), e.theorem().source());
    }

    /** The same program: sphere packing 0.1154623764 bit at rate 0.2, E0(1) = 0.3143737587 bit, critical rate 0.21350606 bit. */
    @Test
    void spherePackingCutoffAndCriticalRateOfTwoKets() {
        assertHolds(0.1154623764, kets(0.2).spherePacking().bits(), 5.1e-11);
        assertHolds(0.3143737587, kets(0).cutoffRate().bits(), 5.1e-11);
        Enclosure critical = kets(0).criticalRate().bits();
        assertTrue(critical.widen(5.1e-9).contains(0.21350606), critical::toString);
        assertTrue(critical.width() < 2e-7, critical::toString);
    }

    /** Kets are supports: E0(s)/s falls to −ln of the larger eigenvalue, 0.89, and below that rate, 0.168 bit, sphere packing is infinite. */
    @Test
    void spherePackingMayBeInfinite() {
        Exponent e = kets(0.1).spherePacking();
        assertTrue(e.value().nats().isInfinite());
        assertEquals(Double.POSITIVE_INFINITY, e.parameter());
        assertTrue(kets(0.17).spherePacking().nats().isFinite());
    }

    /** u D̃_α is (1+u) ln Tr ρ^(1/(1+u)) at the best output state, ρ the mixture. */
    @Test
    void strongConverseOfTwoKets() {
        double rate = 0.6 * Math.log(2);
        double best = 0;
        for (int i = 1; i < 20000; i++) {
            double u = i / 20000.0;
            double t = Math.pow(0.89, 1 / (1 + u)) + Math.pow(0.11, 1 / (1 + u));
            best = Math.max(best, u * rate - (1 + u) * Math.log(t));
        }
        // the grid misses the top by 2.5e-5: by less than 1e-9, as second derivatives are below 1
        assertHolds(best, kets(0.6).strongConverse().nats(), 1e-9);
    }

    private static double entropy(double d) {
        return -d * Math.log(d) - (1 - d) * Math.log(1 - d);
    }

    private static double divergence(double d) {
        return d * Math.log(d / P) + (1 - d) * Math.log((1 - d) / (1 - P));
    }

    private static ErrorExponents symmetric(double d) {
        return ErrorExponents.of(SYMMETRIC, Information.ofNats(Math.log(2) - entropy(d)));
    }

    /** Gallager 1965 (from memory): at the rate ln 2 − h(d), sphere packing is D(d‖p); random coding is the same until d = √p/(√p + √q), and a straight line from there. */
    @Test
    void binarySymmetricChannelBelowCapacity() {
        double root = Math.sqrt(P) + Math.sqrt(1 - P);
        double cutoff = Math.log(2) - 2 * Math.log(root);
        assertHolds(divergence(0.2), symmetric(0.2).spherePacking().nats(), 1e-14);
        assertHolds(divergence(0.2), symmetric(0.2).randomCoding().nats(), 1e-14);
        assertHolds(divergence(0.35), symmetric(0.35).spherePacking().nats(), 1e-14);
        double line = cutoff - Math.log(2) + entropy(0.35);
        assertHolds(line, symmetric(0.35).randomCoding().nats(), 1e-14);
        assertHolds(cutoff, symmetric(0.2).cutoffRate().nats(), 1e-14);
        Enclosure critical = symmetric(0.2).criticalRate().nats();
        assertTrue(critical.contains(Math.log(2) - entropy(Math.sqrt(P) / root)), critical::toString);
    }

    /** Expurgated, equal letters (Gallager 1965, from memory): at rate 0 −¼ ln 4pq; elsewhere s ln 2 − s ln(1 + (4pq)^(1/2s)) − sR. */
    @Test
    void binarySymmetricChannelExpurgated() {
        double overlap = 4 * P * (1 - P);
        Exponent zero = ErrorExponents.of(SYMMETRIC, Information.ofNats(0)).expurgated();
        assertHolds(-0.25 * Math.log(overlap), zero.nats(), 1e-14);
        assertEquals(Double.POSITIVE_INFINITY, zero.parameter());
        double rate = 0.01;
        double best = 0;
        for (int i = 0; i < 200000; i++) {
            double s = 1 + i * 1e-4;
            best = Math.max(best, s * (Math.log(2) - Math.log1p(Math.pow(overlap, 0.5 / s)) - rate));
        }
        Exponent e = ErrorExponents.of(SYMMETRIC, Information.ofNats(rate)).expurgated();
        // the grid misses the top by 5e-5, second derivatives are below 0.1
        assertHolds(best, e.nats(), 1e-9);
        assertTrue(e.parameter() > 1.5);
    }

    /** Dueck and Körner 1979 (from memory): at ln 2 − h(d) above the capacity it is D(d‖p), as long as its slope is below 1. */
    @Test
    void binarySymmetricChannelAboveCapacity() {
        ErrorExponents e = symmetric(0.05);
        assertHolds(divergence(0.05), e.strongConverse().nats(), 1e-14);
        assertEquals(Enclosure.ZERO, e.randomCoding().nats());
        assertEquals(Enclosure.ZERO, e.spherePacking().nats());
        assertEquals(Enclosure.ZERO, e.expurgated().nats());
    }

    /** At the capacity all of them vanish, within what the capacity is known to. */
    @Test
    void zeroAtCapacity() {
        for (ClassicalQuantumChannel channel : List.of(KETS, SYMMETRIC)) {
            ErrorExponents e = ErrorExponents.of(channel, channel.capacity().value());
            assertTrue(e.randomCoding().nats().upper() < 1e-12);
            assertTrue(e.strongConverse().nats().upper() < 1e-12);
            assertEquals(0, e.strongConverse().nats().lower());
        }
    }

    /** A classical channel in a basis that is not diagonal goes by matrices, and has the same exponents. */
    @Test
    void matricesAgreeWithRows() {
        double[][] rows = {{0.7, 0.2, 0.1}, {0.1, 0.1, 0.8}, {0.2, 0.6, 0.2}};
        double c = Math.cos(0.7);
        double s = Math.sin(0.7);
        double[][] basis = {{c, s, 0}, {-s * c, c * c, s}, {s * s, -s * c, c}};
        List<DensityOperator> turned = new ArrayList<>();
        for (double[] row : rows) {
            double[][] w = new double[3][3];
            for (int i = 0; i < 3; i++) {
                for (int j = 0; j <= i; j++) {
                    for (int y = 0; y < 3; y++) {
                        w[i][j] += row[y] * basis[y][i] * basis[y][j];
                    }
                    w[j][i] = w[i][j];
                }
            }
            turned.add(DensityOperator.nearest(org.minorant.core.Operator.ofReal(w))
                    .operator());
        }
        for (double bits : new double[] {0.1, 0.3, 0.6}) {
            ErrorExponents a =
                    ErrorExponents.of(ClassicalQuantumChannel.ofStochasticMatrix(rows), Information.ofBits(bits));
            ErrorExponents b = ErrorExponents.of(ClassicalQuantumChannel.of(turned), Information.ofBits(bits));
            assertMeet(a.randomCoding(), b.randomCoding());
            assertMeet(a.spherePacking(), b.spherePacking());
            assertMeet(a.expurgated(), b.expurgated());
            assertMeet(a.strongConverse(), b.strongConverse());
        }
    }

    private static void assertMeet(Exponent a, Exponent b) {
        Enclosure wide = a.nats().widen(1e-10);
        assertTrue(wide.isPossiblyBelow(b.nats()) && b.nats().isPossiblyBelow(wide), () -> a + " " + b);
        assertTrue(b.nats().width() < 1e-8, b::toString);
    }

    /** Noiseless: random coding ln 2 − R, and supports tell everything apart below the capacity. */
    @Test
    void noiselessChannel() {
        ErrorExponents e = ErrorExponents.of(
                ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1, 0}, {0, 1}}), Information.ofBits(0.5));
        assertHolds(0.5, e.randomCoding().bits(), 1e-14);
        assertTrue(e.spherePacking().nats().isInfinite());
        assertTrue(e.expurgated().nats().isInfinite());
        assertEquals(Enclosure.ZERO, e.strongConverse().nats());
    }

    /** Capacity zero: no error vanishes, and the success of e^(nR) messages is e^(−nR). */
    @Test
    void identicalOutputs() {
        DensityOperator w = DensityOperator.ofBloch(0.3, 0, 0.4);
        ClassicalQuantumChannel channel = ClassicalQuantumChannel.of(w, w);
        ErrorExponents e = ErrorExponents.of(channel, Information.ofNats(0.25));
        assertEquals(Enclosure.ZERO, e.randomCoding().nats());
        assertEquals(Enclosure.ZERO, e.spherePacking().nats());
        assertHolds(0.25, e.strongConverse().nats(), 1e-12);
        assertTrue(e.cutoffRate().nats().upper() < 1e-13);
        assertTrue(ErrorExponents.of(channel, Information.ofNats(0))
                        .expurgated()
                        .nats()
                        .upper()
                < 1e-13);
    }

    /** The success of codes in n uses is bounded by e^(−n times the strong converse exponent). */
    @Test
    void exponentOfTheBoundInNUses() {
        int n = 50;
        Enclosure error = new StrongConverseWords(KETS.renyi(), Optional.empty(), new double[] {0.5, 0.5}, n)
                .error(Information.ofBits(0.6 * n).nats().exp());
        Enclosure exponent = error.complement().ln().negate().dividedBy(Enclosure.exact(n));
        assertEquals(kets(0.6).strongConverse().nats().midpoint(), exponent.midpoint(), 1e-9);
    }

    @Test
    void standings() {
        DensityOperator mixed = DensityOperator.ofBloch(0, 0, 0.9);
        Exponent e = ErrorExponents.of(
                        ClassicalQuantumChannel.of(mixed, DensityOperator.ofBloch(0.6, 0, 0.5)),
                        Information.ofBits(0.1))
                .randomCoding();
        assertEquals(Standing.ANNOUNCED, e.standing());
        assertTrue(
                e.theorem().source().startsWith("conjectured: A. S. Holevo"),
                e.theorem().source());
        assertTrue(e.toString().contains("announced: random-coding exponent"), e.toString());
        Exponent classical = symmetric(0.2).randomCoding();
        assertEquals(Standing.PROVEN, classical.standing());
        assertTrue(classical.theorem().source().contains("Gallager"));
        assertEquals(Standing.PROVEN, symmetric(0.2).spherePacking().standing());
    }

    @ParameterizedTest
    @ValueSource(doubles = {-1e-9, Double.POSITIVE_INFINITY})
    void ratesOutOfRange(double nats) {
        InvalidInputException e =
                assertThrows(InvalidInputException.class, () -> ErrorExponents.of(KETS, Information.ofNats(nats)));
        assertEquals("ErrorExponents.of", e.asked());
        assertEquals("at least 0 and finite", e.limit());
    }

    @Test
    void inputsOutOfRange() {
        ErrorExponents e = kets(0.1);
        assertEquals(
                "ErrorExponents.withInput",
                assertThrows(InvalidInputException.class, () -> e.withInput(1.0))
                        .asked());
        assertThrows(InvalidInputException.class, () -> e.withInput(0.5, 0.4));
        Random random = new Random(1);
        double p = 0.1 + 0.3 * random.nextDouble();
        ErrorExponents poorer = e.withInput(p, 1 - p);
        assertTrue(
                poorer.randomCoding().nats().lower() < e.randomCoding().nats().lower());
        assertTrue(poorer.cutoffRate().nats().isCertainlyBelow(e.cutoffRate().nats()));
        assertEquals(p, poorer.expurgatedInput()[0]);
        assertEquals(e.rate(), poorer.rate());
        assertEquals(e.channel(), poorer.channel());
    }
}
