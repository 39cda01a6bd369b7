package org.minorant.bounds;

import java.util.Optional;
import org.apache.commons.numbers.gamma.InverseErfc;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;

/** Looks for block lengths: where the search goes is a matter of cost, what it returns is certified as {@link BlockLength} says. */
final class BlockLengthSearch {

    /** Below this every whole number is a double. */
    private static final double WHOLE = 0x1p52;

    private static final double GROWTH = 1.2;

    /** Uses in vain below the best one found, for bounds that cost little, before the search ends. */
    private static final int PATIENCE = 48;

    /** The same for the others. */
    private static final int LITTLE_PATIENCE = 2;

    private static final int MOST_USES = 1_000_000;

    /** The normal approximation is not off by this factor at so many uses. */
    private static final double FAR = 4;

    private final CodingBounds bounds;
    private final double epsilon;
    private final WholeUnit unit;
    private final Enclosure rate;
    private Theorem achievability = RandomCoding.THEOREM;

    private BlockLengthSearch(CodingBounds bounds, double fraction, double epsilon, WholeUnit unit) {
        this.bounds = bounds;
        this.epsilon = epsilon;
        this.unit = unit;
        this.rate = bounds.channel().capacity().value().nats().times(fraction);
    }

    static BlockLength of(CodingBounds bounds, double fraction, double epsilon, WholeUnit unit) {
        String asked = "CodingBounds.blockLengthFor";
        ChannelChecks.error(asked, epsilon);
        if (!(fraction > 0 && fraction < 1)) {
            throw new InvalidInputException(
                    asked,
                    "the fraction of capacity is " + fraction,
                    "between 0 and 1, both excluded",
                    "give the fraction that codes are to reach");
        }
        BlockLengthSearch search = new BlockLengthSearch(bounds, fraction, epsilon, unit);
        if (!(search.rate.lower() > 1e-12)) {
            throw new InvalidInputException(
                    asked,
                    "the capacity is "
                            + bounds.channel().capacity().value().bits().toIntervalString(6) + " bit",
                    "more than 1e-12",
                    "give a channel whose outputs differ");
        }
        int sure = search.sure(fraction);
        int impossible = search.impossibleBefore(sure);
        return new BlockLength(
                sure, impossible, fraction, epsilon, unit, search.achievability, TraceMinimumConverse.THEOREM);
    }

    /** ln of the least M asked of n uses, from below: at least φnC, and a whole number or a power of two. It does not fall with n. */
    private double least(int n) {
        Enclosure nats = rate.times(n);
        if (unit == WholeUnit.BITS) {
            double bits = Math.ceil(Information.ofNats(nats).bits().lower());
            return Information.ofBits(bits).nats().lower();
        }
        double messages = nats.exp().lower();
        return messages < WHOLE ? WideDouble.of(Math.ceil(messages)).lnDown() : nats.lower();
    }

    /** M − 1 for the least M that is surely enough, or a little more. */
    private WideDouble others(int n) {
        Enclosure nats = rate.times(n);
        if (unit == WholeUnit.BITS) {
            double bits = Math.ceil(Information.ofNats(nats).bits().upper());
            WideDouble power = WideDouble.ONE.timesPowerOfTwo((long) bits);
            return bits <= 52 ? power.plusUp(WideDouble.ONE.negate()) : power;
        }
        WideDouble most = nats.exp().upperWide();
        return most.toDoubleUp() < WHOLE ? WideDouble.of(Math.ceil(most.toDoubleUp()) - 1) : most;
    }

    private static InvalidInputException tooMany() {
        return new InvalidInputException(
                "CodingBounds.blockLengthFor",
                "more than " + MOST_USES + " uses are needed",
                "at most " + MOST_USES,
                "ask for a smaller fraction of capacity, or see normalApproximation");
    }

    private boolean isSure(int n) {
        if (n > MOST_USES) {
            throw tooMany();
        }
        Optional<Theorem> found = bounds.uses(n).reaching(others(n), epsilon);
        found.ifPresent(t -> achievability = t);
        return found.isPresent();
    }

    private int sure(double fraction) {
        int high = start(fraction);
        int low = 0;
        if (isSure(high)) {
            while (low == 0 && high > 1) {
                int next = (int) Math.min(high - 1, high / GROWTH);
                if (isSure(next)) {
                    high = next;
                } else {
                    low = next;
                }
            }
        } else {
            do {
                low = high;
                high = (int) Math.max(high + 1.0, Math.min(high * GROWTH, MOST_USES + 1.0));
            } while (!isSure(high));
        }
        while (high - low > 1) {
            int middle = (low + high) >>> 1;
            if (isSure(middle)) {
                high = middle;
            } else {
                low = middle;
            }
        }
        int patience = ClassicalCodes.cover(bounds.channel()) ? PATIENCE : LITTLE_PATIENCE;
        for (int n = high - 1; n >= 1 && n >= high - patience; n--) {
            high = isSure(n) ? n : high;
        }
        isSure(high);
        return high;
    }

    /** Where the normal approximation is, (Q⁻¹(ε) √V/((1 − φ)C))². */
    private int start(double fraction) {
        double c = bounds.channel().capacity().value().nats().midpoint();
        double q = Math.max(0, Math.sqrt(2) * InverseErfc.value(2 * epsilon));
        double root = q * Math.sqrt(bounds.channel().dispersion().at(epsilon)) / ((1 - fraction) * c);
        if (root * root > FAR * MOST_USES) {
            throw tooMany();
        }
        return (int) Math.max(1, Math.min(MOST_USES, Math.ceil(root * root)));
    }

    /** The least n' such that a converse at n excludes all from n' to n; n + 1 if not even n. */
    private int excludedFrom(int n) {
        double limit = bounds.uses(n).converse(epsilon).nats().upper();
        // below this not even the real number asked is beyond the limit; in whole messages or bits a little below may
        // be
        double real = Math.floor(limit / rate.lower()) - 2;
        int from = (int) Math.min(n + 1.0, Math.max(1, real - 1 / rate.lower()));
        while (from <= n && !(least(from) > limit)) {
            from++;
        }
        return from;
    }

    private int impossibleBefore(int sure) {
        // a first guess of the least n that is not excluded, as if the converse rose at every step
        int low = 0;
        int high = sure;
        while (high - low > 1) {
            int middle = (low + high) >>> 1;
            if (excludedFrom(middle) <= middle) {
                low = middle;
            } else {
                high = middle;
            }
        }
        int before = high;
        int n = high - 1;
        while (n >= 1) {
            int from = excludedFrom(n);
            before = from > n ? n : before;
            n = Math.min(n, from) - 1;
        }
        return before;
    }
}
