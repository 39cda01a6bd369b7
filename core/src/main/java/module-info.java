/** Operators, certified numbers and the positive pair with its trace-minimum curve. */
module org.minorant.core {
    requires ojalgo;

    exports org.minorant.core;
    exports org.minorant.core.curve;
    exports org.minorant.core.pair;
    exports org.minorant.core.state;
}
