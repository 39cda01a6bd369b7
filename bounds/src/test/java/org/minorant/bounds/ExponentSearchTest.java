package org.minorant.bounds;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.minorant.core.Enclosure;
import org.minorant.core.Information;

/** The certificate alone, on families made for it. */
final class ExponentSearchTest {

    /** Two letters with the parabolas s(1−s) and ½s(1−s) of which no member's value is known above 0, so that nothing leads the search to their top. */
    private static final class Parabolas implements ExponentFamily {

        private final boolean ends;

        Parabolas(boolean ends) {
            this.ends = ends;
        }

        @Override
        public ExponentPoint first() {
            return at(0);
        }

        @Override
        public Optional<Double> last() {
            return ends ? Optional.of(1.0) : Optional.empty();
        }

        @Override
        public ExponentPoint at(double s) {
            List<ExponentLine> lines = List.of(line(0.5, s), line(1, s));
            return new ExponentPoint(
                    s,
                    Enclosure.ZERO,
                    lines,
                    0,
                    new Lazy<>(() -> List.of(Enclosure.exact(0.25), Enclosure.exact(0.5))));
        }

        private static ExponentLine line(double scale, double s) {
            return new ExponentLine(Enclosure.exact(scale * s * (1 - s)), Enclosure.exact(scale * (1 - 2 * s)));
        }

        @Override
        public Enclosure limit() {
            return Enclosure.ZERO;
        }

        @Override
        public Enclosure lastSlope(ExponentPoint far) {
            return Enclosure.ZERO;
        }
    }

    /** The top of s(1−s) − sR is (1−R)²/4, and no point needs to lie on it. */
    @Test
    void topsBetweenPoints() {
        for (double rate : new double[] {0, 0.1, 0.37}) {
            ExponentSearch.Result r = ExponentSearch.of(new Parabolas(true), Enclosure.exact(rate));
            double top = (1 - rate) * (1 - rate) / 4;
            assertTrue(r.supremum().upper() >= top, r.supremum()::toString);
            assertTrue(r.supremum().upper() < 0.34, r.supremum()::toString);
            assertEquals(0, r.supremum().lower());
        }
    }

    /** Without end the lines fall at last, and the same top is found. */
    @Test
    void withoutEnd() {
        ExponentSearch.Result r = ExponentSearch.of(new Parabolas(false), Enclosure.exact(0.1));
        assertTrue(r.supremum().upper() >= 0.2025 && r.supremum().upper() < 0.34, r.supremum()::toString);
    }

    /** At rate zero the sphere-packing exponent of a binary symmetric channel is the limit −½ ln 4pq, which no s reaches. */
    @Test
    void limitAtRateZero() {
        double p = 0.11;
        ClassicalQuantumChannel channel =
                ClassicalQuantumChannel.ofStochasticMatrix(new double[][] {{1 - p, p}, {p, 1 - p}});
        Enclosure e = ErrorExponents.of(channel, Information.ofNats(0))
                .spherePacking()
                .nats();
        assertTrue(e.widen(1e-15).contains(-0.5 * Math.log(4 * p * (1 - p))), () -> e.toIntervalString(17));
        assertTrue(e.width() < 1e-4, () -> e.toIntervalString(17));
    }
}
