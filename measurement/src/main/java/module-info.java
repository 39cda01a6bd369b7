/** Hypothesis pairs, ensembles, tests and measurements. */
module org.minorant.measurement {
    requires transitive org.minorant.core;

    exports org.minorant.measurement;
}
