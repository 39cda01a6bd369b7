package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.Information;
import org.minorant.core.WideDouble;

/** The number M of messages of a code, and M − 1, the weight at which its bounds read the curve. */
final class MessageCount {

    /** Below this every whole number is a double. */
    private static final double WHOLE = 0x1p52;

    private MessageCount() {}

    /** M − 1. */
    static Enclosure others(String asked, long messages) {
        ChannelChecks.messages(asked, messages);
        long others = messages - 1;
        double d = others;
        // beyond 2^53 a long may fall between two doubles
        return (long) d == others && d < 0x1p53 ? Enclosure.exact(d) : Enclosure.of(Math.nextDown(d), Math.nextUp(d));
    }

    /** M − 1 for a real M of which the logarithm is known. */
    static Enclosure others(String asked, Information lnMessages) {
        ChannelChecks.messages(asked, lnMessages);
        return lnMessages.nats().exp().minus(Enclosure.ONE).max(Enclosure.ZERO);
    }

    /** M itself. */
    static Enclosure messages(String asked, long messages) {
        return others(asked, messages).plus(Enclosure.ONE);
    }

    /** M itself for a real M of which the logarithm is known. */
    static Enclosure messages(String asked, Information lnMessages) {
        ChannelChecks.messages(asked, lnMessages);
        return lnMessages.nats().exp();
    }

    /**
     * ln(1 + others) where the real threshold 1 + others is at least two; 0, that is one message, where it is below two: a code has one message
     * or at least two.
     */
    static Information threshold(Enclosure others, Theorem theorem) {
        Enclosure ln = others.plus(Enclosure.ONE).ln();
        WideDouble low = others.lowerWide().compareTo(WideDouble.ONE) >= 0 ? ln.lowerWide() : WideDouble.ZERO;
        WideDouble high = others.upperWide().compareTo(WideDouble.ONE) >= 0 ? ln.upperWide() : WideDouble.ZERO;
        boolean none = high.signum() == 0;
        return Information.ofNats(Enclosure.of(low, high))
                .withSource(none ? theorem + ": no two messages; one message never fails" : theorem.toString());
    }

    /** The logarithm of the largest whole number of messages that a certified real threshold allows. */
    static Information whole(Enclosure others) {
        if (others.lower() >= WHOLE) {
            // ⌊M⌋ > M − 1, and M − 1 is what is enclosed here
            return Information.ofNats(others.ln().lower());
        }
        return Information.ofNats(
                Enclosure.exact(1 + Math.floor(Math.max(0, others.lower()))).ln());
    }
}
