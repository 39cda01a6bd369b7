package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/**
 * One certified bound on a number: its value, the side on which it stands, the theorem behind it and the hypotheses of that theorem that
 * were
 * checked before it was applied.
 *
 * <p><b>Value.</b> The bound is itself a number of which an enclosure is known. If it is a lower bound, the number it bounds is at least
 * {@code
 * value().lower()}; if an upper bound, at most {@code value().upper()}; if exact, between the two. Bounds on amounts of information hold
 * their
 * value in nats and give it as {@link #information()} too.
 *
 * <p>Immutable and thread-safe.
 */
public final class Bound {

    private final Side side;
    private final Enclosure value;
    private final Optional<Information> information;
    private final Theorem theorem;
    private final List<String> hypotheses;

    private Bound(
            Side side, Enclosure value, Optional<Information> information, Theorem theorem, List<String> hypotheses) {
        this.side = side;
        this.value = value;
        this.information = information;
        this.theorem = theorem;
        this.hypotheses = List.copyOf(hypotheses);
        for (String h : this.hypotheses) {
            Checks.text("Bound", "a hypothesis", h);
        }
    }

    /**
     * Returns a bound on a plain number, such as a probability.
     *
     * @param side the side on which it stands
     * @param value an enclosure of the bound
     * @param theorem what it rests on
     * @param hypotheses the hypotheses of the theorem, each as it was checked; empty if it has none beyond the types of its arguments
     * @return the bound
     */
    public static Bound of(Side side, Enclosure value, Theorem theorem, List<String> hypotheses) {
        return new Bound(side, value, Optional.empty(), theorem, hypotheses);
    }

    /**
     * Returns a bound on an amount of information, such as the logarithm of a number of messages.
     *
     * @param side the side on which it stands
     * @param value the bound
     * @param theorem what it rests on
     * @param hypotheses the hypotheses of the theorem, each as it was checked; empty if it has none beyond the types of its arguments
     * @return the bound
     */
    public static Bound of(Side side, Information value, Theorem theorem, List<String> hypotheses) {
        return new Bound(side, value.nats(), Optional.of(value), theorem, hypotheses);
    }

    /**
     * Returns the side on which the bound stands.
     *
     * @return lower, exact or upper
     */
    public Side side() {
        return side;
    }

    /**
     * Returns an enclosure of the bound.
     *
     * @return the bound; in nats if it is an amount of information
     */
    public Enclosure value() {
        return value;
    }

    /**
     * Returns the bound as an amount of information.
     *
     * @return the amount; empty if the bound is on a plain number
     */
    public Optional<Information> information() {
        return information;
    }

    /**
     * Returns the theorem behind the bound.
     *
     * @return its name and source
     */
    public Theorem theorem() {
        return theorem;
    }

    /**
     * Returns the hypotheses that were checked.
     *
     * @return an unmodifiable list, empty if the theorem has none beyond the types of its arguments
     */
    public List<String> hypotheses() {
        return hypotheses;
    }

    /** Side, value and source in one line. */
    @Override
    public String toString() {
        return side + " " + (information.isPresent() ? information.get().toString() : value.toString()) + " " + theorem;
    }
}
