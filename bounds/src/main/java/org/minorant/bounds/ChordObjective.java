package org.minorant.bounds;

import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/** What {@link ChordSearch} minimises: a function of s and f(s), nondecreasing in f. */
interface ChordObjective {

    /**
     * Encloses the value at one sample.
     *
     * @param s the point
     * @param f f(s)
     * @return the value
     */
    Enclosure at(WideDouble s, Enclosure f);

    /**
     * Encloses the least value that a line below f gives between two samples.
     *
     * @param line a line below f there
     * @return the least value; its lower end is what counts
     */
    Enclosure least(Line line);

    /**
     * Finds where that least value is taken, roughly.
     *
     * @param line a line below f there
     * @return a point between the two samples
     */
    WideDouble argument(Line line);

    /**
     * The line F + b(s − s₁) on [s₁, s₂]: not above the chord of the certified lower ends, so not above a concave nondecreasing f.
     *
     * @param from s₁
     * @param to s₂
     * @param start F
     * @param slope b, at least 0
     */
    record Line(WideDouble from, WideDouble to, WideDouble start, WideDouble slope) {

        static Line below(WideDouble s1, Enclosure f1, WideDouble s2, Enclosure f2) {
            WideDouble start = f1.lowerWide();
            // f is nondecreasing: where rounding says otherwise the value at the left end serves at the right one too
            WideDouble rise = f2.lowerWide().max(start).plusDown(start.negate());
            WideDouble run = s2.plusUp(s1.negate());
            return new Line(s1, s2, start, rise.dividedByDown(run).max(WideDouble.ZERO));
        }

        /** A point clamped to the piece, or a positive number, whatever rounding did to it. */
        WideDouble clamp(WideDouble s) {
            return s.max(from).min(to);
        }
    }

    private static Enclosure point(WideDouble v) {
        return Enclosure.of(v, v);
    }

    /**
     * s f(s)/(s − t) for s &gt; t. With v = s − t and the line a + bv, a ≥ 0, it is a + bt + bv + ta/v, convex in v, so above its tangent at any v.
     *
     * @param t the weight M − 1
     */
    record Error(WideDouble t) implements ChordObjective {

        @Override
        public Enclosure at(WideDouble s, Enclosure f) {
            return point(s).times(f).dividedBy(point(s).minus(point(t)));
        }

        @Override
        public Enclosure least(Line line) {
            WideDouble b = slope(line);
            WideDouble a = intercept(line, b);
            Enclosure v1 = point(line.from()).minus(point(t));
            Enclosure v2 = point(line.to()).minus(point(t));
            Enclosure v = point(touch(line));
            Enclosure ta = point(t).times(point(a));
            Enclosure slope = point(b).minus(ta.dividedBy(v.times(v)));
            Enclosure touched = point(b).times(v).plus(ta.dividedBy(v));
            Enclosure low = touched.plus(slope.times(v1.minus(v))).min(touched.plus(slope.times(v2.minus(v))));
            return point(a).plus(point(b).times(point(t))).plus(low);
        }

        /** b, lowered if need be so that the line does not become negative at t, where f is not. */
        private WideDouble slope(Line line) {
            WideDouble v1 = line.from().plusUp(t.negate());
            return line.slope().min(line.start().dividedByDown(v1).max(WideDouble.ZERO));
        }

        private WideDouble intercept(Line line, WideDouble b) {
            WideDouble v1 = line.from().plusUp(t.negate());
            return line.start().plusDown(b.timesUp(v1).negate()).max(WideDouble.ZERO);
        }

        private WideDouble touch(Line line) {
            WideDouble b = slope(line);
            WideDouble a = intercept(line, b);
            WideDouble v1 = line.from().plusDown(t.negate());
            WideDouble v2 = line.to().plusDown(t.negate());
            return b.signum() == 0
                    ? v2
                    : t.timesDown(a)
                            .dividedByDown(b)
                            .max(WideDouble.ZERO)
                            .sqrtDown()
                            .max(v1)
                            .min(v2);
        }

        @Override
        public WideDouble argument(Line line) {
            return line.clamp(touch(line).plusDown(t));
        }
    }

    /**
     * −s(1 − f(s)/ε). With the line in place of f it is a convex parabola, so above its tangent at any s.
     *
     * @param epsilon ε
     */
    record Threshold(double epsilon) implements ChordObjective {

        @Override
        public Enclosure at(WideDouble s, Enclosure f) {
            return point(s).times(f.dividedBy(Enclosure.exact(epsilon)).minus(Enclosure.ONE));
        }

        @Override
        public Enclosure least(Line line) {
            Enclosure s = point(argument(line));
            Enclosure slope = point(line.slope()).dividedBy(Enclosure.exact(epsilon));
            Enclosure rest = point(line.start())
                    .minus(point(line.slope()).times(point(line.from())))
                    .dividedBy(Enclosure.exact(epsilon))
                    .minus(Enclosure.ONE);
            Enclosure touched = s.times(rest.plus(slope.times(s)));
            Enclosure derivative = rest.plus(slope.times(s).times(2));
            Enclosure left = touched.plus(derivative.times(point(line.from()).minus(s)));
            Enclosure right = touched.plus(derivative.times(point(line.to()).minus(s)));
            return left.min(right);
        }

        @Override
        public WideDouble argument(Line line) {
            WideDouble b = line.slope();
            if (b.signum() == 0) {
                return line.to();
            }
            WideDouble numerator =
                    WideDouble.of(epsilon).plusDown(line.start().negate()).plusDown(b.timesDown(line.from()));
            return line.clamp(numerator.dividedByDown(b).timesPowerOfTwo(-1));
        }
    }
}
