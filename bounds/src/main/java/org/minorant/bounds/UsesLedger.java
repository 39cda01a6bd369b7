package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import java.util.function.Supplier;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;

/** Collects the bounds on codes of n uses. What is refused for the channel in n uses is left out, and the quantity's name says so. */
final class UsesLedger {

    private static final List<String> WHOLE = List.of("whole messages");

    private final int uses;
    private final List<Bound> bounds = new ArrayList<>();
    private final List<String> refused = new ArrayList<>();

    UsesLedger(int uses) {
        this.uses = uses;
    }

    /** Adds a lower bound on ln M from the threshold of M − 1, in whole messages. */
    void whole(Supplier<Enclosure> others, Theorem theorem) {
        attempt(
                () -> Bound.of(
                        Side.LOWER, MessageCount.whole(others.get()).withSource(theorem.toString()), theorem, WHOLE),
                theorem);
    }

    /** Adds a bound on ln M. */
    void add(Side side, Supplier<Information> value, Theorem theorem) {
        attempt(() -> Bound.of(side, value.get(), theorem, List.of()), theorem);
    }

    /** Adds a bound on the error. */
    void plain(Side side, Supplier<Enclosure> value, Theorem theorem) {
        attempt(() -> Bound.of(side, value.get(), theorem, List.of()), theorem);
    }

    private void attempt(Supplier<Bound> bound, Theorem theorem) {
        try {
            bounds.add(bound.get());
        } catch (InvalidInputException e) {
            // the arguments were checked before: only a channel that many uses do not cover comes here
            if (uses == 1) {
                throw e;
            }
            refused.add(theorem.name());
        }
    }

    /** The ledger of a quantity. */
    Ledger of(String quantity) {
        String where = uses == 1 ? "" : " in " + uses + " uses";
        String left = refused.isEmpty() ? "" : " (not covered for this channel: " + String.join("; ", refused) + ")";
        return Ledger.of(quantity + where + left, bounds);
    }
}
