/** Divergences, channels, bounds and ledgers. */
module org.minorant.bounds {
    requires transitive org.minorant.measurement;

    exports org.minorant.bounds;
}
