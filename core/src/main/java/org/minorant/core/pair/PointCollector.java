package org.minorant.core.pair;

/** Keeps the weight and the value of every type on its lines. */
final class PointCollector implements TypeBox.Line {

    private final PowerTable innerWeight;
    private final PowerTable innerValue;
    private final PowerTable lastWeight;
    private final PowerTable lastValue;
    private final Effort effort;
    private final WideArray weights = new WideArray(1024);
    private final WideArray values = new WideArray(1024);
    private int sinceCheck;

    PointCollector(TypeBox box, Effort effort) {
        int k = box.letters();
        innerWeight = box.firstOf(k - 2);
        innerValue = box.secondOf(k - 2);
        lastWeight = box.firstOf(k - 1);
        lastValue = box.secondOf(k - 1);
        this.effort = effort;
    }

    @Override
    public void visit(int m, int from, int to, double a, long ea, double b, long eb) {
        sinceCheck += to - from + 1;
        if (sinceCheck > 100_000) {
            sinceCheck = 0;
            effort.checkpoint();
        }
        for (int k = from; k <= to; k++) {
            int i = k - innerWeight.from;
            int j = m - k - lastWeight.from;
            weights.add(
                    a * innerWeight.significand[i] * lastWeight.significand[j],
                    ea + innerWeight.exponent[i] + lastWeight.exponent[j]);
            values.add(
                    b * innerValue.significand[i] * lastValue.significand[j],
                    eb + innerValue.exponent[i] + lastValue.exponent[j]);
        }
    }

    WideArray weights() {
        return weights;
    }

    WideArray values() {
        return values;
    }
}
