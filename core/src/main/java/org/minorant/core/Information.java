package org.minorant.core;

/**
 * An amount of information, certified: the same quantity in nats (natural logarithms) and in bits (binary logarithms).
 *
 * <p>bits = nats / ln 2. The conversion rounds outward. Immutable and thread-safe.
 */
public final class Information {

    /** ln 2 between two neighbouring doubles. */
    private static final Enclosure LN2 = Enclosure.of(0x1.62e42fefa39efp-1, 0x1.62e42fefa39f0p-1);

    private final Enclosure nats;
    private final Enclosure bits;
    private final String source;

    private Information(Enclosure nats, Enclosure bits, String source) {
        this.nats = nats;
        this.bits = bits;
        this.source = source;
    }

    /**
     * Returns an amount given in nats.
     *
     * @param nats the amount in nats
     * @return the amount
     */
    public static Information ofNats(Enclosure nats) {
        return new Information(nats, nats.dividedBy(LN2), "");
    }

    /**
     * Returns an amount given in nats, exactly.
     *
     * @param nats the amount in nats
     * @return the amount
     * @throws InvalidInputException if it is NaN
     */
    public static Information ofNats(double nats) {
        return ofNats(Enclosure.exact(nats));
    }

    /**
     * Returns an amount given in bits.
     *
     * @param bits the amount in bits
     * @return the amount
     */
    public static Information ofBits(Enclosure bits) {
        return new Information(bits.times(LN2), bits, "");
    }

    /**
     * Returns an amount given in bits, exactly.
     *
     * @param bits the amount in bits
     * @return the amount
     * @throws InvalidInputException if it is NaN
     */
    public static Information ofBits(double bits) {
        return ofBits(Enclosure.exact(bits));
    }

    /**
     * Returns the same amount with the theorem or method it comes from.
     *
     * @param theorem the source, for people to read
     * @return the same amount with that source
     */
    public Information withSource(String theorem) {
        return new Information(nats, bits, theorem);
    }

    /**
     * Returns the amount in nats.
     *
     * @return the amount in nats
     */
    public Enclosure nats() {
        return nats;
    }

    /**
     * Returns the amount in bits.
     *
     * @return the amount in bits
     */
    public Enclosure bits() {
        return bits;
    }

    /**
     * Returns the theorem or method the amount comes from.
     *
     * @return the source; empty if it was given as a plain amount
     */
    public String source() {
        return source;
    }

    @Override
    public boolean equals(Object o) {
        return o instanceof Information i && nats.equals(i.nats) && bits.equals(i.bits) && source.equals(i.source);
    }

    @Override
    public int hashCode() {
        return 31 * nats.hashCode() + source.hashCode();
    }

    /** The amount in bits, with certain digits only. */
    @Override
    public String toString() {
        return bits + " bit";
    }
}
