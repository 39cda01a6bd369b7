/** Divergences, channels, bounds and ledgers. */
module org.minorant.bounds {
    requires transitive org.minorant.measurement;
    requires org.apache.commons.numbers.gamma;

    exports org.minorant.bounds;
    exports org.minorant.bounds.codes;
}
