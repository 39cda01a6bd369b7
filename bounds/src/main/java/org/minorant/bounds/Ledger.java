package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.Iterator;
import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;

/**
 * Every bound on one number, ordered and checked against each other.
 *
 * <p><b>Order.</b> Lower bounds from the weakest to the best, then the number itself if it is known, then upper bounds from the best to the
 * weakest: read downwards, values rise. Bounds of equal certified value keep the order in which they were given.
 *
 * <p><b>Check.</b> A ledger exists only if every bound that holds from below is possibly at most every bound that holds from above.
 *
 * <p>Immutable and thread-safe.
 */
public final class Ledger implements Iterable<Bound> {

    private final String quantity;
    private final List<Bound> bounds;

    private Ledger(String quantity, List<Bound> bounds) {
        this.quantity = quantity;
        this.bounds = bounds;
    }

    /**
     * Returns the ledger of some bounds on one number.
     *
     * @param quantity what is bounded, as it is to be printed, such as "minimum error"
     * @param bounds the bounds, at least one; all plain numbers or all amounts of information
     * @return the ledger
     * @throws InvalidInputException if the name is blank, there is no bound, or plain numbers and amounts of information are mixed
     * @throws InconsistentBoundsException if a lower bound exceeds an upper bound with certainty
     */
    public static Ledger of(String quantity, List<Bound> bounds) {
        Checks.text("Ledger.of", "the quantity", quantity);
        if (bounds.isEmpty()) {
            throw new InvalidInputException(
                    "Ledger.of", "there is no bound", "at least one", "give the trivial bound where no other applies");
        }
        boolean information = bounds.get(0).information().isPresent();
        for (Bound b : bounds) {
            if (b.information().isPresent() != information) {
                throw new InvalidInputException(
                        "Ledger.of",
                        "plain numbers and amounts of information are mixed, the latter is " + b,
                        "one unit",
                        "give bounds on the same number");
            }
        }
        for (Bound low : bounds) {
            for (Bound high : bounds) {
                if (low.side().holdsFromBelow()
                        && high.side().holdsFromAbove()
                        && !low.value().isPossiblyBelow(high.value())) {
                    throw new InconsistentBoundsException(quantity, low, high);
                }
            }
        }
        List<Bound> ordered = new ArrayList<>(bounds);
        ordered.sort(Comparator.comparing(Bound::side).thenComparing(Ledger::certified));
        return new Ledger(quantity, List.copyOf(ordered));
    }

    /** What a bound certifies: the lower end of a lower bound, the upper end of an upper one. */
    private static WideDouble certified(Bound b) {
        return b.side() == Side.UPPER ? b.value().upperWide() : b.value().lowerWide();
    }

    /**
     * Returns what is bounded.
     *
     * @return the quantity's name
     */
    public String quantity() {
        return quantity;
    }

    /**
     * Returns all bounds in order.
     *
     * @return an unmodifiable list, see the class comment for its order
     */
    public List<Bound> bounds() {
        return List.copyOf(bounds);
    }

    /**
     * Returns the bounds on one side, in order.
     *
     * @param side the side
     * @return an unmodifiable list, empty if there is none
     */
    public List<Bound> bounds(Side side) {
        return bounds.stream().filter(b -> b.side() == side).toList();
    }

    /**
     * Returns the best lower bound proper: the one of largest certified value.
     *
     * @return the bound; empty if there is none
     */
    public Optional<Bound> bestLower() {
        List<Bound> low = bounds(Side.LOWER);
        return low.isEmpty() ? Optional.empty() : Optional.of(low.get(low.size() - 1));
    }

    /**
     * Returns the best upper bound proper: the one of least certified value.
     *
     * @return the bound; empty if there is none
     */
    public Optional<Bound> bestUpper() {
        List<Bound> high = bounds(Side.UPPER);
        return high.isEmpty() ? Optional.empty() : Optional.of(high.get(0));
    }

    /**
     * Returns the number itself, if it is among the bounds.
     *
     * @return the exact value; the one of least relative width if there are several; empty if there is none
     */
    public Optional<Bound> exact() {
        return bounds(Side.EXACT).stream()
                .min(Comparator.comparingDouble(b -> b.value().relativeWidth()));
    }

    /**
     * Returns what all bounds together say of the number.
     *
     * @return an enclosure of the number, in nats if it is an amount of information; −∞ or +∞ where no bound holds from that side
     */
    public Enclosure enclosure() {
        WideDouble low = WideDouble.NEGATIVE_INFINITY;
        WideDouble high = WideDouble.POSITIVE_INFINITY;
        for (Bound b : bounds) {
            low = b.side().holdsFromBelow() ? low.max(b.value().lowerWide()) : low;
            high = b.side().holdsFromAbove() ? high.min(b.value().upperWide()) : high;
        }
        return Enclosure.of(low, high);
    }

    @Override
    public Iterator<Bound> iterator() {
        return bounds.iterator();
    }

    /** A table: one line for each bound with its side, value (bits, if an amount of information), theorem, source and hypotheses. */
    @Override
    public String toString() {
        return LedgerTable.of(this);
    }
}
