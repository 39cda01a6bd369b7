package org.minorant.bounds;

import java.util.function.DoubleUnaryOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.HermitianOperator;
import org.minorant.core.Information;
import org.minorant.core.KrausChannel;
import org.minorant.core.Operator;
import org.minorant.core.SpectralDecomposition;

/**
 * The one-shot converse for codes with shared entanglement: M messages with average error ε need, for some input ρ and every output state σ,
 *
 * <pre>1/M ≥ β_ε(N(θ_ρ) ‖ ρ_R ⊗ σ) = sup over t ≥ 0 of Tr[tN(θ_ρ) ∧ ρ_R ⊗ σ] − tε.</pre>
 *
 * <p><b>Argument.</b> Message m makes the input ω_m on A and Bob's half E of what is shared; ω_m on E is the same for all m. With ρ the mean input, some map takes R of θ_ρ to message and E. Testing whether the decoder
 * finds the message accepts N(θ_ρ) with 1 − ε, and ρ_R ⊗ σ with at most 1/M, as message and E are independent there.
 *
 * <p><b>All inputs at once.</b> With J the Choi operator, an operator Y ≥ 0 with Y ≥ tJ − 1 ⊗ σ and Tr_B Y ≤ λ1 gives Tr(tN(θ_ρ) − ρ_R ⊗ σ)₊ ≤ λ for <em>every</em> ρ, as N(θ_ρ) = √ρ_R J √ρ_R; so
 *
 * <pre>1/M ≥ t(1 − ε) − λ.</pre>
 *
 * For an invertible ρ₀, (tN(θ_ρ₀) − ρ₀ ⊗ σ)₊ between inverse roots of ρ₀ is such a Y. For symmetric channels ({@link AssistedLetters}) and ρ₀ = 1/d its part on R is a multiple of the identity, in n uses, too, so that λ is its trace, and
 * the maximally entangled input is the best. For other channels λ is an eigenvalue, certified here for one use.
 */
final class AssistedConverse {

    static final Theorem THEOREM = new Theorem(
            "one-shot converse with shared entanglement, hypothesis testing against an output state",
            "W. Matthews, S. Wehner, IEEE Trans. Inf. Theory 60, 7317 (2014) (from memory)");

    private static final double UP = 1 + 0x1p-40;

    /** Logarithms of t that are looked at: t is at least 1/M, and at most 1/ε. */
    private static final double MOST = 40;

    private static final int GRID = 100;

    private final EnclosedMatrix joint;
    private final EnclosedMatrix product;
    private final EnclosedMatrix reference;
    private final HermitianOperator roughJoint;
    private final HermitianOperator roughProduct;
    private final Operator inverseRoot;
    private final int in;
    private final int out;

    private AssistedConverse(KrausChannel channel, AssistedInput input) {
        in = channel.inputDimension();
        out = channel.outputDimension();
        EnclosedMatrix x = EnclosedMatrix.of(input.root().transpose());
        reference = x.times(x.adjoint());
        EnclosedMatrix columns = EnclosedMatrix.of(input.root().transpose().tensor(HermitianOperator.identity(out)))
                .times(channel.choiOperator().factor().columns());
        joint = columns.times(columns.adjoint());
        EnclosedMatrix sigma = AssistedCapacityCertificate.image(channel.krausOperators(), input.matrix());
        product = tensor(reference, sigma);
        roughJoint = rough(joint);
        roughProduct = rough(product);
        inverseRoot = rough(reference).apply(v -> 1 / Math.sqrt(v));
    }

    /**
     * The converse for one use of any channel.
     *
     * @param channel the channel
     * @param input an input of full rank; its output is σ
     */
    static AssistedConverse of(KrausChannel channel, AssistedInput input) {
        return new AssistedConverse(channel, input);
    }

    /** An upper bound on ln M at average error ε, a number. */
    Information messages(double epsilon) {
        double lnT = minimiser(u -> roughLambda(Math.exp(u)) - Math.exp(u) * (1 - epsilon));
        double t = Math.exp(lnT);
        Enclosure s = Enclosure.exact(epsilon).complement().times(t).minus(Enclosure.exact(lambda(t)));
        Enclosure least = Enclosure.of(s.lowerWide(), s.lowerWide());
        Enclosure nats = s.lowerWide().signum() > 0
                ? Enclosure.exact(least.ln().negate().max(Enclosure.ZERO).upper())
                : Enclosure.infinite();
        return Information.ofNats(nats).withSource(THEOREM.toString());
    }

    /** A lower bound on the average error of M messages, a number. */
    Enclosure error(Enclosure messages) {
        double each = 1 / messages.lower();
        double lnT = minimiser(u -> (roughLambda(Math.exp(u)) + each) / Math.exp(u));
        double t = Math.exp(lnT);
        Enclosure bound = Enclosure.exact(lambda(t))
                .plus(Enclosure.ONE.dividedBy(messages))
                .dividedBy(Enclosure.exact(t))
                .complement();
        return Enclosure.exact(Math.max(0, bound.lower()));
    }

    /** The positive part is not convex as an operator, so that there may be several minima: a grid, a finer one, then the best of its intervals. Any t gives a bound. */
    private double minimiser(DoubleUnaryOperator f) {
        double from = -2 * Math.log(in * out) - 2;
        double step = (MOST - from) / GRID;
        double best = onGrid(f, from, step);
        double fine = 2 * step / GRID;
        best = onGrid(f, best - step, fine);
        return Unimodal.minimiser(f, best - fine, best + fine);
    }

    private static double onGrid(DoubleUnaryOperator f, double from, double step) {
        double best = from;
        double least = Double.POSITIVE_INFINITY;
        for (int i = 0; i <= GRID; i++) {
            double value = f.applyAsDouble(from + i * step);
            if (value < least) {
                least = value;
                best = from + i * step;
            }
        }
        return best;
    }

    private double roughLambda(double t) {
        HermitianOperator d = roughJoint.times(t).minus(roughProduct);
        SpectralDecomposition s = d.spectralDecomposition();
        HermitianOperator q = HermitianOperator.of(symmetric(marginal(s.apply(v -> Math.max(0, v)))));
        double[] values = HermitianOperator.of(symmetric(inverseRoot.times(q).times(inverseRoot)))
                .eigenvalues();
        return values[values.length - 1];
    }

    /** A number λ with Tr_B Y ≤ λ for some feasible Y, certified. */
    private double lambda(double t) {
        EnclosedMatrix d = joint.times(t).minus(product);
        EnclosedSpectrum s = EnclosedSpectrum.of(d);
        EnclosedMatrix.Builder kept = EnclosedMatrix.builder(s.dimension(), s.dimension());
        for (int i = 0; i < s.dimension(); i++) {
            if (s.value(i) > 0) {
                kept.set(i, i, s.value(i), s.valueTail(i), 0, 0, 0);
            }
        }
        // VΛ₊V* + residual is above VΛV* + residual, so above the difference, and positive
        EnclosedMatrix y = s.vectors().times(kept.build()).times(s.vectors().adjoint());
        EnclosedMatrix q = marginal(y).plus(EnclosedMatrix.identity(in).times(s.residual() * out * UP));
        double first = roughLambda(t) * (1 + 1e-13);
        double missing = -EnclosedSpectrum.of(reference.times(first).minus(q))
                .eigenvalue(0)
                .lower();
        double least = EnclosedSpectrum.of(reference).eigenvalue(0).lower();
        if (missing > 0 && !(least > 0)) {
            return Double.POSITIVE_INFINITY;
        }
        return missing > 0 ? (first + missing / least * UP) * UP : first;
    }

    /** Tr_B. */
    private EnclosedMatrix marginal(EnclosedMatrix y) {
        EnclosedMatrix sum = EnclosedMatrix.builder(in, in).build();
        for (int o = 0; o < out; o++) {
            EnclosedMatrix.Builder b = EnclosedMatrix.builder(in, in);
            for (int i = 0; i < in; i++) {
                for (int j = 0; j < in; j++) {
                    int p = i * out + o;
                    int q = j * out + o;
                    b.set(i, j, y.re(p, q), y.reTail(p, q), y.im(p, q), y.imTail(p, q), y.radius(p, q));
                }
            }
            sum = sum.plus(b.build());
        }
        return sum;
    }

    private Operator marginal(HermitianOperator y) {
        double[] re = new double[in * in];
        double[] im = new double[in * in];
        for (int i = 0; i < in; i++) {
            for (int j = 0; j < in; j++) {
                for (int o = 0; o < out; o++) {
                    re[i * in + j] += y.re(i * out + o, j * out + o);
                    im[i * in + j] += y.im(i * out + o, j * out + o);
                }
            }
        }
        return Operator.ofRowMajor(in, in, re, im);
    }

    private static EnclosedMatrix tensor(EnclosedMatrix a, EnclosedMatrix b) {
        int n = a.rows() * b.rows();
        EnclosedMatrix.Builder left = EnclosedMatrix.builder(n, n);
        EnclosedMatrix.Builder right = EnclosedMatrix.builder(n, n);
        int d = b.rows();
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                if (i % d == j % d) {
                    set(left, i, j, a, i / d, j / d);
                }
                if (i / d == j / d) {
                    set(right, i, j, b, i % d, j % d);
                }
            }
        }
        return left.build().times(right.build());
    }

    private static void set(EnclosedMatrix.Builder to, int i, int j, EnclosedMatrix m, int p, int q) {
        to.set(i, j, m.re(p, q), m.reTail(p, q), m.im(p, q), m.imTail(p, q), m.radius(p, q));
    }

    private static HermitianOperator rough(EnclosedMatrix m) {
        int n = m.rows();
        double[] re = new double[n * n];
        double[] im = new double[n * n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                re[i * n + j] = m.re(i, j);
                im[i * n + j] = m.im(i, j);
            }
        }
        return HermitianOperator.of(symmetric(Operator.ofRowMajor(n, n, re, im)));
    }

    private static Operator symmetric(Operator a) {
        return a.plus(a.adjoint()).times(0.5);
    }
}
