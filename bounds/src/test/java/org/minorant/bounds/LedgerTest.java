package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** The ledger: order, consistency, best values, printing. */
class LedgerTest {

    private static final Theorem THEOREM = new Theorem("rule", "A. Author, Journal 1, 2 (1999), equation 3");

    private static Bound bound(Side side, double low, double high) {
        return Bound.of(side, Enclosure.of(low, high), THEOREM, List.of());
    }

    private static Bound nats(Side side, double low, double high) {
        return Bound.of(side, Information.ofNats(Enclosure.of(low, high)), THEOREM, List.of("n >= 1"));
    }

    @Test
    void valuesRiseDownwards() {
        Bound weak = bound(Side.LOWER, 0.1, 0.11);
        Bound good = bound(Side.LOWER, 0.2, 0.21);
        Bound exact = bound(Side.EXACT, 0.25, 0.26);
        Bound best = bound(Side.UPPER, 0.3, 0.31);
        Bound poor = bound(Side.UPPER, 0.29, 0.5);
        Ledger ledger = Ledger.of("error", List.of(poor, exact, good, best, weak));
        List<Bound> read = new ArrayList<>();
        ledger.forEach(read::add);
        assertEquals(List.of(weak, good, exact, best, poor), read);
        assertEquals(read, ledger.bounds());
        assertEquals(good, ledger.bestLower().orElseThrow());
        assertEquals(best, ledger.bestUpper().orElseThrow());
        assertEquals(exact, ledger.exact().orElseThrow());
        assertEquals(List.of(best, poor), ledger.bounds(Side.UPPER));
        assertEquals(Enclosure.of(0.25, 0.26), ledger.enclosure());
        assertEquals("error", ledger.quantity());
        assertThrows(UnsupportedOperationException.class, () -> ledger.bounds().remove(0));
    }

    @Test
    void oneSideAlone() {
        Ledger ledger = Ledger.of("capacity", List.of(nats(Side.LOWER, 0.5, 0.6)));
        assertTrue(ledger.bestUpper().isEmpty());
        assertTrue(ledger.exact().isEmpty());
        assertEquals(Enclosure.of(0.5, Double.POSITIVE_INFINITY), ledger.enclosure());
        Ledger above = Ledger.of("capacity", List.of(nats(Side.UPPER, 0.5, 0.6)));
        assertTrue(above.bestLower().isEmpty());
        assertEquals(Enclosure.of(Double.NEGATIVE_INFINITY, 0.6), above.enclosure());
    }

    @Test
    void theNarrowestExactValueIsTheExactOne() {
        Bound narrow = bound(Side.EXACT, 0.25, 0.2500001);
        assertEquals(
                narrow,
                Ledger.of("error", List.of(bound(Side.EXACT, 0.2, 0.3), narrow))
                        .exact()
                        .orElseThrow());
    }

    @Test
    void boundsMayTouchAndOverlapWithinTheirWidths() {
        Ledger.of("error", List.of(bound(Side.LOWER, 0.3, 0.3), bound(Side.UPPER, 0.3, 0.3)));
        Ledger.of("error", List.of(bound(Side.LOWER, 0.3, 0.4), bound(Side.UPPER, 0.2, 0.3)));
    }

    @Test
    void aLowerBoundAboveAnUpperOneIsAnError() {
        Bound low = bound(Side.LOWER, Math.nextUp(0.3), 0.4);
        Bound high = bound(Side.UPPER, 0.2, 0.3);
        InconsistentBoundsException e = assertThrows(
                InconsistentBoundsException.class,
                () -> Ledger.of("error", List.of(high, bound(Side.LOWER, 0.1, 0.1), low)));
        assertEquals(low, e.lower());
        assertEquals(high, e.upper());
        assertEquals(
                "Ledger of the error is inconsistent: lower bound [0.30000000000000004, 0.40000000000000003] by rule [A. Author, Journal 1, 2 (1999), equation 3] exceeds "
                        + "upper bound [0.20000000000000001, 0.29999999999999999] by rule [A. Author, Journal 1, 2 (1999), equation 3]; "
                        + "one of the two bounds is wrong, please report both operators",
                e.getMessage());
    }

    @Test
    void theExactValueIsCheckedFromBothSides() {
        Bound exact = bound(Side.EXACT, 0.5, 0.5);
        assertThrows(
                InconsistentBoundsException.class,
                () -> Ledger.of("error", List.of(exact, bound(Side.LOWER, 0.6, 0.7))));
        assertThrows(
                InconsistentBoundsException.class,
                () -> Ledger.of("error", List.of(exact, bound(Side.UPPER, 0.3, 0.4))));
        assertThrows(
                InconsistentBoundsException.class,
                () -> Ledger.of("error", List.of(exact, bound(Side.EXACT, 0.3, 0.4))));
    }

    @Test
    void infiniteBoundsAreInOrder() {
        Ledger ledger = Ledger.of(
                "divergence",
                List.of(nats(Side.UPPER, Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY), nats(Side.LOWER, 1, 2)));
        assertEquals(Side.LOWER, ledger.bounds().get(0).side());
        assertThrows(
                InconsistentBoundsException.class,
                () -> Ledger.of(
                        "divergence",
                        List.of(
                                nats(Side.LOWER, Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY),
                                nats(Side.UPPER, 1, 2))));
    }

    @Test
    void whatIsRefused() {
        assertThrows(InvalidInputException.class, () -> Ledger.of("error", List.of()));
        assertThrows(InvalidInputException.class, () -> Ledger.of(" ", List.of(bound(Side.LOWER, 0, 0))));
        assertThrows(
                InvalidInputException.class,
                () -> Ledger.of("error", List.of(bound(Side.LOWER, 0, 0), nats(Side.UPPER, 1, 1))));
        assertThrows(InvalidInputException.class, () -> new Theorem("", "source"));
        assertThrows(InvalidInputException.class, () -> new Theorem("name", " "));
        assertThrows(InvalidInputException.class, () -> Bound.of(Side.LOWER, Enclosure.ZERO, THEOREM, List.of("")));
    }

    @Test
    void theTable() {
        Ledger ledger = Ledger.of(
                "number of messages", List.of(nats(Side.UPPER, Math.log(4), Math.log(4)), nats(Side.LOWER, 0, 0)));
        assertEquals("""
                Bounds on the number of messages
                side   value              theorem  checked  source
                lower  0.0 bit            rule     n >= 1   A. Author, Journal 1, 2 (1999), equation 3
                upper  2.000000000000000 bit  rule     n >= 1   A. Author, Journal 1, 2 (1999), equation 3
                """.replaceAll(" +", " "), ledger.toString().replaceAll(" +", " "));
        String[] lines = ledger.toString().split("\n");
        int column = lines[1].indexOf("theorem");
        assertEquals(column, lines[2].indexOf("rule"));
        assertEquals(column, lines[3].indexOf("rule"));
        assertFalse(lines[1].endsWith(" "));
    }

    @Test
    void aBoundSaysWhatItIs() {
        Bound b = nats(Side.LOWER, Math.log(2), Math.log(2));
        assertEquals(Side.LOWER, b.side());
        assertEquals(THEOREM, b.theorem());
        assertEquals(List.of("n >= 1"), b.hypotheses());
        assertTrue(b.information().orElseThrow().bits().contains(1));
        assertEquals(Enclosure.exact(Math.log(2)), b.value());
        assertEquals("lower 1.00000000000000 bit rule [A. Author, Journal 1, 2 (1999), equation 3]", b.toString());
        assertEquals(
                "upper 0.5 rule [A. Author, Journal 1, 2 (1999), equation 3]",
                bound(Side.UPPER, 0.5, 0.5).toString());
        assertTrue(bound(Side.UPPER, 0.5, 0.5).information().isEmpty());
    }
}
