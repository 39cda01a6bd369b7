package org.minorant.measurement;

import java.util.List;
import java.util.Optional;
import org.minorant.core.DensityOperator;
import org.minorant.core.Enclosure;
import org.minorant.core.Estimate;
import org.minorant.core.Information;
import org.minorant.core.InvalidInputException;
import org.minorant.core.WideDouble;
import org.minorant.core.curve.Curve;
import org.minorant.core.curve.SupportLines;
import org.minorant.core.curve.Supremum;
import org.minorant.core.pair.Effort;
import org.minorant.core.pair.PositivePair;
import org.minorant.core.pair.Work;
import org.minorant.core.pair.WorkListener;

/**
 * Two hypotheses: the system is in the first state ρ, or in the second state σ.
 *
 * <p>Everything here but the explicit tests follows from the curve f(t) = Tr[ρ ∧ tσ] of a {@link PositivePair} alone, whatever its structure; so
 * a pair may also be given by its curve. A test is an operator 0 ≤ T ≤ 1 that accepts the first state; its type-I error is Tr ρ(1−T), its type-II error
 * Tr σT.
 *
 * <p><b>Accuracy.</b> Every value is enclosed. Where the curve has relative accuracy, so have the errors, however small.
 *
 * <p><b>Traces.</b> The states are used as given; a trace that is one only up to rounding enters every value as it is.
 *
 * <p>Immutable and thread-safe.
 *
 * <p>Sources: C. W. Helstrom, Quantum Detection and Estimation Theory (1976), ch. IV; A. S. Holevo, J. Multivariate Anal. 3, 337 (1973) (both from memory).
 */
public final class HypothesisPair {

    /** A gap of a few units in the last place is not worth another value of the curve. */
    private static final double RELATIVE_GAP = 0x1p-48;

    private static final double TRACE_ROUNDING = 0x1p-50;

    private final PositivePair curve;
    private final Optional<States> states;
    private final Optional<Copied> copied;
    private final Effort effort;

    private HypothesisPair(PositivePair curve, Optional<States> states, Optional<Copied> copied, Effort effort) {
        this.curve = curve;
        this.states = states;
        this.copied = copied;
        this.effort = effort;
    }

    /** Where a pair of many copies comes from. */
    private record Copied(HypothesisPair single, int copies) {}

    private record States(DensityOperator first, DensityOperator second) {}

    /**
     * Returns the pair of two states.
     *
     * @param first ρ
     * @param second σ
     * @return the pair
     * @throws InvalidInputException if the dimensions differ
     */
    public static HypothesisPair of(DensityOperator first, DensityOperator second) {
        Checks.dimension("HypothesisPair.of", "the second state", second, first.dimension());
        return new HypothesisPair(
                PositivePair.of(first, second),
                Optional.of(new States(first, second)),
                Optional.empty(),
                Effort.DEFAULT);
    }

    /**
     * Returns the pair of two states that are known by their curve only; it answers everything but explicit tests.
     *
     * @param curve the curve of (ρ, σ)
     * @return the pair
     * @throws InvalidInputException if a trace is not one within d · 2^-50
     */
    public static HypothesisPair ofCurve(PositivePair curve) {
        double tolerance = curve.dimension() * TRACE_ROUNDING;
        unitTrace("first", curve.firstTrace(), tolerance);
        unitTrace("second", curve.secondTrace(), tolerance);
        return new HypothesisPair(curve, Optional.empty(), Optional.empty(), Effort.DEFAULT);
    }

    /** The pair of two operators whose traces may be a little off one, for enclosures from both sides. */
    static HypothesisPair ofAnyCurve(PositivePair curve) {
        return new HypothesisPair(curve, Optional.empty(), Optional.empty(), Effort.DEFAULT);
    }

    /**
     * Returns the pair of n copies: the system is n times in the first state, or n times in the second, ρ^⊗n against σ^⊗n. Its curve is exact, in whatever form
     * the structure of one copy allows ({@link PositivePair#copies}); a matrix of dimension d^n is never formed, so explicit tests cannot be asked for.
     *
     * @param n the number of copies, at least 1
     * @return the pair of n copies; this pair for n = 1
     * @throws InvalidInputException if n is below 1, or no exact form of n copies fits
     */
    public HypothesisPair copies(int n) {
        if (n == 1) {
            return this;
        }
        long all = (long) copyCount() * n;
        if (all > Integer.MAX_VALUE) {
            throw new InvalidInputException(
                    "HypothesisPair.copies", n + " copies of " + copyCount(), "fewer than 2^31 in all", "take fewer");
        }
        HypothesisPair one = single();
        return new HypothesisPair(
                one.curve.copies((int) all).withEffort(effort),
                Optional.empty(),
                Optional.of(new Copied(one, (int) all)),
                effort);
    }

    /**
     * Returns the pair of products of powers: n₁ copies of the first pair's systems together with n₂ of the second's, and so on, all in their first states or all in their second states.
     *
     * <p>Qubits go by products of spin blocks; others as {@link org.minorant.core.pair.PairPowers} says.
     *
     * @param pairs pairs of states, one copy each
     * @param copies n₁, n₂, …, as many, each at least 1
     * @return the pair ρ₁^⊗n₁ ⊗ ρ₂^⊗n₂ ⊗ … against σ₁^⊗n₁ ⊗ σ₂^⊗n₂ ⊗ …
     * @throws InvalidInputException if the numbers do not match or are below 1, a pair has no states, or there are too many products of blocks, types or dimensions
     */
    public static HypothesisPair ofProducts(List<HypothesisPair> pairs, int... copies) {
        return ofCurve(PositivePair.ofPowers(
                pairs.stream().map(HypothesisPair::first).toList(),
                pairs.stream().map(HypothesisPair::second).toList(),
                copies));
    }

    /**
     * Returns the number of copies.
     *
     * @return n, 1 for a pair that was not made by {@link #copies}
     */
    public int copyCount() {
        return copied.map(Copied::copies).orElse(1);
    }

    /**
     * Returns the pair of one copy.
     *
     * @return the pair that {@link #copies} was called on, this pair if there was none
     */
    public HypothesisPair single() {
        return copied.map(Copied::single).orElse(this);
    }

    /**
     * Returns this pair with values of the curve to another relative width; 1e-12 if none was asked for. Where one copy is evaluated to full precision at once, nothing changes.
     *
     * @param relativeWidth between 1e-15 and 1
     * @return the pair
     * @throws InvalidInputException if the width is out of range
     */
    public HypothesisPair withTolerance(double relativeWidth) {
        return with(effort.withTolerance(relativeWidth));
    }

    /**
     * Returns this pair with a listener that follows long evaluations and can cancel them.
     *
     * @param listener told about progress, asked whether to stop
     * @return the pair
     */
    public HypothesisPair withProgress(WorkListener listener) {
        return with(effort.withListener(listener));
    }

    private HypothesisPair with(Effort e) {
        return new HypothesisPair(curve.withEffort(e), states, copied, e);
    }

    private static void unitTrace(String name, Enclosure trace, double tolerance) {
        if (!(trace.lower() <= 1 + tolerance && trace.upper() >= 1 - tolerance)) {
            throw new InvalidInputException(
                    "HypothesisPair.ofCurve",
                    "the trace of the " + name + " operator is " + trace,
                    "1 within " + tolerance,
                    "use PositivePair itself for operators that are not states");
        }
    }

    /**
     * Returns the curve that everything follows from.
     *
     * @return the pair (ρ, σ) with f(t) = Tr[ρ ∧ tσ]
     */
    public PositivePair curve() {
        return curve;
    }

    /**
     * Tells whether the two states are at hand, so that explicit tests can be had.
     *
     * @return whether {@link #first()}, {@link #second()} and the tests can be asked for
     */
    public boolean hasStates() {
        return states.isPresent();
    }

    /**
     * Returns the first state.
     *
     * @return ρ
     * @throws InvalidInputException if the pair was given by its curve only
     */
    public DensityOperator first() {
        return states("HypothesisPair.first").first();
    }

    /**
     * Returns the second state.
     *
     * @return σ
     * @throws InvalidInputException if the pair was given by its curve only
     */
    public DensityOperator second() {
        return states("HypothesisPair.second").second();
    }

    private States states(String asked) {
        return states.orElseThrow(() -> new InvalidInputException(
                asked,
                "the pair is known by its curve only",
                "two states",
                "make the pair with HypothesisPair.of(first, second), or ask for errors instead of tests"));
    }

    /**
     * Returns the minimum error probability of telling the states apart, Tr[pρ ∧ (1−p)σ].
     *
     * <p>1 − p is meant exactly: where a double cannot hold it the value is widened by what that changes at most, a relative 2^-53 or less. 0 for
     * p = 0 and p = 1.
     *
     * @param prior p, the prior of the first state, between 0 and 1
     * @return the minimum error
     * @throws InvalidInputException if the prior is not between 0 and 1
     */
    public Enclosure minimumError(double prior) {
        Checks.inRange("HypothesisPair.minimumError", "the prior", prior, 0, 1);
        double rest = 1 - prior;
        // exact: for 0 ≤ p ≤ 1 both differences are (Sterbenz, or the error of a rounded sum)
        double lost = (1 - rest) - prior;
        Enclosure value = curve.traceMinimum(prior, rest);
        // Tr[pρ ∧ (1+x)qσ] lies between (1 ∓ |x|) times Tr[pρ ∧ qσ]: it does not decrease, and is at most homogeneous
        return lost == 0 ? value : value.times(Enclosure.ONE.widen(Math.abs(lost) / rest * (1 + 0x1p-50)));
    }

    /**
     * Returns the test that attains the minimum error as a source of simulated outcomes, block by block for many copies.
     *
     * @param prior p, the prior of the first state, strictly between 0 and 1
     * @return the test
     * @throws InvalidInputException if the prior is not strictly between 0 and 1
     */
    public CollectiveTest collectiveTest(double prior) {
        Checks.inRange("HypothesisPair.collectiveTest", "the prior", prior, Double.MIN_NORMAL, Math.nextDown(1.0));
        return new CollectiveTest(curve.blockTests(WideDouble.of(prior), WideDouble.of(1 - prior)));
    }

    /**
     * Returns how much work the minimum error is, before it is done.
     *
     * @param prior p, the prior of the first state, strictly between 0 and 1
     * @return the number of blocks, the largest rank and the memory
     * @throws InvalidInputException if the prior is not strictly between 0 and 1
     */
    public Work work(double prior) {
        Checks.inRange("HypothesisPair.work", "the prior", prior, Double.MIN_NORMAL, Math.nextDown(1.0));
        return curve.work(WideDouble.of(prior), WideDouble.of(1 - prior));
    }

    /**
     * Returns the least number of copies at which the minimum error is at most a target, enclosed there and one copy before.
     *
     * <p>Made from {@link #single() one copy} of this pair, with this pair's tolerance and listener.
     *
     * @param prior p, the prior of the first state, strictly between 0 and 1
     * @param target the error to reach, above 0 and below min(p, 1 − p), which guessing reaches without any copy
     * @return the number of copies, with the errors that prove it
     * @throws InvalidInputException if a number is out of range, or a million copies are not enough
     */
    public CopiesNeeded copiesFor(double prior, double target) {
        String asked = "HypothesisPair.copiesFor";
        Checks.inRange(asked, "the prior", prior, Double.MIN_NORMAL, Math.nextDown(1.0));
        Checks.inRange(asked, "the target", target, Double.MIN_NORMAL, Math.nextDown(Math.min(prior, 1 - prior)));
        return new CopiesSearch(single().with(effort), prior, target).run();
    }

    /**
     * Returns the minimum error probability without proof, faster than {@link #minimumError} for many copies.
     *
     * @param prior p, the prior of the first state, between 0 and 1
     * @return an estimate of the minimum error
     * @throws InvalidInputException if the prior is not between 0 and 1
     */
    public Estimate minimumErrorEstimate(double prior) {
        Checks.inRange("HypothesisPair.minimumErrorEstimate", "the prior", prior, 0, 1);
        return curve.traceMinimumEstimate(WideDouble.of(prior), WideDouble.of(1 - prior));
    }

    /**
     * Returns f(t) = Tr[ρ ∧ tσ].
     *
     * @param t the weight on the second state, at least 0 and finite
     * @return f(t)
     * @throws InvalidInputException if t is negative, NaN or infinite
     */
    public Enclosure traceMinimum(double t) {
        return curve.traceMinimum(t);
    }

    /**
     * Returns the least type-II error of all tests, randomised ones included, with type-I error at most ε:
     *
     * <pre>β_ε = min { Tr σT : 0 ≤ T ≤ 1, Tr ρ(1−T) ≤ ε } = sup { Tr[tρ ∧ σ] − tε : t ≥ 0 }</pre>
     *
     * (strong duality; K. M. R. Audenaert, M. Mosonyi, F. Verstraete, J. Math. Phys. 53, 122205, 2012, from memory). Both ends come from certified values of
     * Tr[tρ ∧ σ] by concavity: any t gives a lower end, extended chords an upper one.
     *
     * <p><b>Cost.</b> 10 to 50 values of the curve to full precision, most where it has corners and is smooth elsewhere; about 15 to a tolerance of 1e-9 ({@link
     * #typeTwoError(double, double)}). For many copies the tolerance is that of {@link #withTolerance}. Where the curve has cheap estimates ({@link PositivePair#hasCheapEstimate}) these are followed: about 5 values to full precision, 3
     * to a tolerance, and some thirty estimates. See {@link SupportLines}.
     *
     * <p><b>Special cases.</b> 0 if ε is at least Tr ρ. At ε = 0 it is Tr σΠ with Π the projector onto the support of ρ: where the pair has states and
     * ρ has a factor that certifies its support (kets, full rank), both ends are tight; otherwise the upper end is Tr σ.
     *
     * @param level ε, at least 0
     * @return β_ε
     * @throws InvalidInputException if the level is negative, NaN or infinite
     */
    public Enclosure typeTwoError(double level) {
        // values of many copies are no narrower than their effort asks for, and each costs time
        double gap = copied.isPresent() ? Math.max(RELATIVE_GAP, effort.tolerance()) : RELATIVE_GAP;
        return typeTwo("HypothesisPair.typeTwoError", supportLines(), level, gap, 0)
                .value();
    }

    /**
     * Returns the hypothesis-testing relative entropy D_H^ε(ρ‖σ) = −ln β_ε (L. Wang, R. Renner, Phys. Rev. Lett. 108, 200501, 2012, from memory), +∞ where β_ε = 0.
     *
     * @param level ε, at least 0
     * @return D_H^ε, of the n copies if this is a pair of copies
     * @throws InvalidInputException if the level is negative, NaN or infinite
     */
    public Information hypothesisTestingDivergence(double level) {
        return Information.ofNats(typeTwoError(level).ln().negate());
    }

    /**
     * Returns the least type-II error as {@link #typeTwoError(double)}, to a tolerance: the values of the curve that more digits would cost are saved.
     *
     * @param level ε, at least 0
     * @param relativeTolerance the relative width that is narrow enough, between 0 and 1; the width of the result may be larger where the curve is not known well enough,
     *     and is smaller where that costs nothing
     * @return β_ε
     * @throws InvalidInputException if the level is negative, NaN or infinite, or the tolerance is not between 0 and 1
     */
    public Enclosure typeTwoError(double level, double relativeTolerance) {
        String asked = "HypothesisPair.typeTwoError";
        double tolerance = Checks.inRange(asked, "the relative tolerance", relativeTolerance, 0, 1);
        return typeTwo(asked, supportLines(), level, Math.max(tolerance, RELATIVE_GAP), 0)
                .value();
    }

    /** The curve t ↦ Tr[tρ ∧ σ], without samples yet. */
    private SupportLines supportLines() {
        Curve values = t -> curve.traceMinimum(t, WideDouble.ONE);
        Curve f = curve.hasCheapEstimate() ? values.withGuess(this::lnEstimate) : values;
        return new SupportLines(
                f, curve.firstTrace().upperWide(), curve.secondTrace().upperWide());
    }

    private double lnEstimate(double lnT) {
        return curve.traceMinimumEstimate(WideDouble.expDown(lnT), WideDouble.ONE)
                .ln();
    }

    private Supremum typeTwo(String asked, SupportLines lines, double level, double relativeGap, double absoluteGap) {
        Checks.inRange(asked, "the type-I level", level, 0, Double.MAX_VALUE);
        Supremum s = lines.at(Enclosure.exact(level), relativeGap, absoluteGap);
        if (level > 0 || states.isEmpty()) {
            return s;
        }
        Enclosure support = SupportOverlap.of(states.get().first(), states.get().second());
        return s.intersect(support);
    }

    /**
     * Returns the test that attains the minimum error: T projects onto the positive part of pρ − (1−p)σ. Stored in doubles, it attains it
     * within rounding, about d · 1e-16.
     *
     * @param prior p, the prior of the first state, between 0 and 1
     * @return the Helstrom test; it accepts always for p = 1 and never for p = 0
     * @throws InvalidInputException if the prior is not between 0 and 1, or the pair was given by its curve only
     */
    public BinaryTest helstromTest(double prior) {
        String asked = "HypothesisPair.helstromTest";
        Checks.inRange(asked, "the prior", prior, 0, 1);
        States s = states(asked);
        return new ThresholdTests(s.first(), s.second()).helstrom(prior);
    }

    /**
     * Returns a test with type-I error at most ε whose type-II error is the least, within the rounding of its entries: a mixture of two projectors onto
     * positive parts of tρ − σ on either side of the threshold (the quantum Neyman–Pearson test, randomised at the threshold).
     *
     * <p>{@code typeOneError().upper()} is at most ε, with certainty; the level is attained within rounding. Levels near the rounding of the
     * entries, about d · 1e-16, leave room for no such test but acceptance; at ε = 0 the projector onto the support of ρ is returned if its stored entries certify
     * a type-I error of exactly 0, otherwise the test that always accepts.
     *
     * @param level ε, at least 0
     * @return the test
     * @throws InvalidInputException if the level is negative, NaN or infinite, or the pair was given by its curve only
     */
    public BinaryTest neymanPearsonTest(double level) {
        String asked = "HypothesisPair.neymanPearsonTest";
        States s = states(asked);
        Supremum best = typeTwo(asked, supportLines(), level, RELATIVE_GAP, 0);
        return new ThresholdTests(s.first(), s.second()).neymanPearson(level, best);
    }

    /**
     * Returns the whole error trade-off curve between two polygons that are nowhere further apart than a tolerance, or as near as the values of f
     * allow; at most 2000 corners are spent. Where β_0 cannot be certified (see {@link #typeTwoError}) the polygons stay apart within 1e-10 of the
     * axis.
     *
     * @param tolerance the largest distance along the type-II axis to aim at, above 0; 1e-3 is enough for a chart
     * @return the curve; {@link TradeOffCurve#gap()} says what was reached
     * @throws InvalidInputException if the tolerance is not above 0 and at most 1
     */
    public TradeOffCurve tradeOffCurve(double tolerance) {
        String asked = "HypothesisPair.tradeOffCurve";
        Checks.inRange(asked, "the tolerance", tolerance, Double.MIN_NORMAL, 1);
        return sketch(asked, 0, tolerance / 8).refined(tolerance);
    }

    /**
     * Returns the error trade-off curve with both polygons as near as the values of f allow at chosen levels, however small the errors there; between
     * levels it is a chord above and support lines below.
     *
     * @param levels type-I errors, each between 0 and 1; 0 and 1 are added
     * @return the curve
     * @throws InvalidInputException if a level is not between 0 and 1
     */
    public TradeOffCurve tradeOffCurveAt(double... levels) {
        String asked = "HypothesisPair.tradeOffCurveAt";
        TradeOffSketch sketch = sketch(asked, RELATIVE_GAP, 0);
        for (double l : levels) {
            sketch.add(Checks.inRange(asked, "the type-I level", l, 0, 1));
        }
        sketch.add(0);
        sketch.add(1);
        return sketch.curve();
    }

    /** A sketch whose samples of f are shared between levels. */
    private TradeOffSketch sketch(String asked, double relativeGap, double absoluteGap) {
        SupportLines lines = supportLines();
        return new TradeOffSketch(level -> typeTwo(asked, lines, level, relativeGap, absoluteGap));
    }

    /** The kind of curve and the dimension. */
    @Override
    public String toString() {
        return "HypothesisPair, dimension " + curve.dimension() + ", " + curve.kind();
    }
}
