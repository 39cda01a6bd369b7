package org.minorant.study;

import java.util.ArrayList;
import java.util.List;
import org.minorant.bounds.Bound;
import org.minorant.bounds.Ledger;
import org.minorant.bounds.Side;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** Collects the rows of a section. */
final class Rows {

    private final List<Row> rows = new ArrayList<>();

    void exact(String quantity, String argument, Enclosure value, Unit unit, Citation by) {
        rows.add(new Row(quantity, argument, Side.EXACT, value, unit, by));
    }

    /** An amount of information with the source that it carries itself. */
    void exact(String quantity, String argument, Information value) {
        exact(quantity, argument, value.bits(), Unit.BITS, Citation.of(argument, value.source()));
    }

    void bound(String quantity, String argument, Side side, Enclosure value, Unit unit, Citation by) {
        rows.add(new Row(quantity, argument, side, value, unit, by));
    }

    /** Every bound of a ledger, in its order; amounts of information in bits. */
    void ledger(String quantity, String argument, Ledger ledger) {
        for (Bound b : ledger) {
            Enclosure value = b.information().map(Information::bits).orElse(b.value());
            Unit unit = b.information().isPresent() ? Unit.BITS : Unit.PROBABILITY;
            rows.add(new Row(quantity, argument, b.side(), value, unit, Citation.of(b)));
        }
    }

    List<Row> all() {
        return List.copyOf(rows);
    }
}
