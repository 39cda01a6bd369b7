package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.PetzCurve;
import org.minorant.bounds.divergence.RelativeEntropy;
import org.minorant.bounds.divergence.Sandwiched;
import org.minorant.bounds.divergence.SpectralState;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.Operator;
import org.minorant.core.PositiveOperator;
import org.minorant.core.SpectralDecomposition;

/**
 * Outputs that are any matrices. Searches go on in double, in the span of the outputs; what they find is certified by the spectra of letters and state.
 *
 * <p><b>E0 from above and below.</b> A letter lies between U(D − κ)U* and U(D + κ)U* + R ({@link SpectralState}), and so do its powers α ≤ 1 between theirs, as they are operator monotone: W^α is within
 * (D + κ)^α − (D − κ)^α + ‖R‖^α of U D^α U* in norm. The eigenvalues of A follow.
 *
 * <p><b>The best output state of an order above one, from below.</b> Schatten norms are dual to each other: for any positive T_x,
 *
 * <pre>‖ρ_XB^½ (ρ_X ⊗ σ)^(−u) ρ_XB^½‖_α ≥ Tr Kσ^(−u) / (Σ_x Tr T_x^(1/u))^u,   K = Σ_x P(x)^(1−u) W_x^½ T_x W_x^½,</pre>
 *
 * and Tr Kσ^(−u) ≥ (Tr K^(1/(1+u)))^(1+u) for every state σ by the reverse of Hölder's inequality. Equality is reached where T_x ∝ P(x)^u (W_x^½ σ^(−u) W_x^½)^(α−1) at the best σ.
 */
final class MatrixRenyi implements RenyiOutputs {

    /** Output states of orders above one get this weight of the maximally mixed state, so that they surely have full support. */
    private static final double FLOOR = 0x1p-43;

    /** The same for mixtures, whose letters may be known only to the rounding of their entries. */
    private static final double FLOOR_OF_MIXTURES = 0x1p-34;

    /** Eigenvalues below this make roots of negative order lose too many digits. */
    private static final double TINY = 1e-6;

    private final List<DensityOperator> outputs;
    private final Enclosure traces;
    private final List<SpectralState> letters = new ArrayList<>();
    /** An orthonormal basis of the span of all outputs, in its columns. */
    private final Operator basis;
    /** Columns X_x of the letters in that basis, of orthogonal columns. */
    private final List<Operator> roots = new ArrayList<>();

    MatrixRenyi(List<DensityOperator> outputs) {
        this.outputs = outputs;
        this.traces = Traces.hull(outputs);
        double[] equal = new double[outputs.size()];
        Arrays.fill(equal, 1.0 / equal.length);
        this.basis = SpectralState.of(DensityOperator.mixture(outputs, equal))
                .vectors()
                .toOperator();
        Operator bra = basis.adjoint();
        for (DensityOperator w : outputs) {
            SpectralState s = SpectralState.of(w);
            letters.add(s);
            roots.add(bra.times(HermitianPowers.scaled(s.vectors().toOperator(), powers(s, 0.5))));
        }
    }

    private static double[] powers(SpectralState s, double exponent) {
        double trace = s.trace().hi();
        return s.values().stream()
                .mapToDouble(b -> Math.pow(b.hi() / trace, exponent))
                .toArray();
    }

    @Override
    public boolean isWellConditioned() {
        double[] even = new double[outputs.size()];
        Arrays.fill(even, 1.0 / even.length);
        Operator mixture = mixed(0, even);
        return Arrays.stream(HermitianPowers.spectrum(mixture).eigenvalues())
                        .min()
                        .orElse(0)
                > TINY;
    }

    @Override
    public LettersAgainst againstFlooredMixture(double[] p) {
        PositiveOperator sigma = full(DensityOperator.mixture(outputs, p), FLOOR_OF_MIXTURES);
        return new Pairs(sigma, Enclosure.ZERO);
    }

    @Override
    public int letters() {
        return outputs.size();
    }

    @Override
    public LettersAgainst against(DensityOperator sigma) {
        return new Pairs(sigma, Enclosure.ZERO);
    }

    @Override
    public LettersAgainst againstMixture(double[] p) {
        // the mixture of the normalised letters lies within this factor of the normalised mixture of those given
        Enclosure ratio = traces.dividedBy(traces);
        return new Pairs(DensityOperator.mixture(outputs, p), ratio.ln());
    }

    @Override
    public LettersAgainst againstLetter(int x) {
        return new Pairs(outputs.get(x), new Lazy<>(() -> letters.get(x)), Enclosure.ZERO);
    }

    @Override
    public Enclosure zeroOrder(double[] p) {
        EnclosedMatrix sum = EnclosedMatrix.builder(basis.rows(), basis.rows()).build();
        for (int x = 0; x < p.length; x++) {
            SpectralState w = letters.get(x);
            if (p[x] > 0 && w.restRank() > 0) {
                return Enclosure.of(0, Double.POSITIVE_INFINITY);
            }
            if (p[x] > 0) {
                sum = sum.plus(w.vectors().times(w.vectors().adjoint()).times(p[x]));
            }
        }
        EnclosedSpectrum s = EnclosedSpectrum.of(sum);
        return s.eigenvalue(s.dimension() - 1)
                .dividedBy(Traces.sum(p))
                .ln()
                .negate()
                .max(Enclosure.ZERO);
    }

    /** A in the basis, in double. */
    private Operator mixed(double s, double[] p) {
        Operator a = Operator.ofRowMajor(
                basis.columns(), basis.columns(), new double[basis.columns() * basis.columns()], new double[0]);
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                a = a.plus(powered(x, 1 / (1 + s)).times(p[x]));
            }
        }
        return a;
    }

    /** W_x^α in the basis: X_x = (columns of unit length) √λ, so X λ^(α−1) X*. */
    private Operator powered(int x, double alpha) {
        Operator half = HermitianPowers.scaled(roots.get(x), powers(letters.get(x), 0.5 * (alpha - 1)));
        return half.times(half.adjoint());
    }

    @Override
    public double[] traces(double s, double[] p) {
        SpectralDecomposition a = HermitianPowers.spectrum(mixed(s, p));
        double f = 0;
        for (double v : HermitianPowers.powers(a, 1 + s)) {
            f += v;
        }
        double[] q = new double[p.length];
        // Tr W^α A^s, with σ^(1−α) = A^s / F^(s/(1+s))
        Operator half = HermitianPowers.columns(a, s / 2);
        Operator power = half.times(half.adjoint());
        for (int x = 0; x < q.length; x++) {
            q[x] = HermitianPowers.traceOfProduct(powered(x, 1 / (1 + s)), power) / Math.pow(f, s / (1 + s));
        }
        return q;
    }

    @Override
    public LettersAgainst againstOptimum(double s, double[] p) {
        SpectralDecomposition a = HermitianPowers.spectrum(mixed(s, p));
        return new Pairs(
                PositiveOperator.ofFactor(basis.times(HermitianPowers.columns(a, 0.5 * (1 + s)))), Enclosure.ZERO);
    }

    @Override
    public Enclosure gallager(double s, double[] p) {
        Enclosure inverse = Enclosure.ONE.plus(Enclosure.exact(s));
        EnclosedMatrix a = EnclosedMatrix.builder(basis.rows(), basis.rows()).build();
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                a = a.plus(EnclosedPowers.of(letters.get(x), s).times(p[x]));
            }
        }
        EnclosedSpectrum spectrum = EnclosedSpectrum.of(a);
        Enclosure f = Enclosure.ZERO;
        for (int i = 0; i < spectrum.dimension(); i++) {
            f = f.plus(EnclosedPowers.power(spectrum.eigenvalue(i), inverse));
        }
        return f.ln().minus(Traces.sum(p).ln().times(inverse)).negate().max(Enclosure.ZERO);
    }

    @Override
    public Sandwich sandwich(double u, double[] p, Optional<Operator> near) {
        SandwichedState state = SandwichedState.of(roots, u, p, near);
        SpectralDecomposition s = HermitianPowers.spectrum(state.sigma());
        Operator inside = basis.times(HermitianPowers.columns(s, 0.5));
        PositiveOperator full = full(PositiveOperator.ofFactor(inside), FLOOR);
        return new Sandwich(
                Optional.of(state.sigma()),
                new Pairs(full, Enclosure.ZERO),
                state.traces(),
                state.lnScale(),
                state.norm(),
                new Lazy<>(() -> DualNorm.lower(letters, u, p, state.certificates())));
    }

    /** The operator with a weight of the maximally mixed state, by a factor with as many columns as rows. */
    private PositiveOperator full(PositiveOperator sigma, double weight) {
        PositiveOperator sum = sigma.plus(PositiveOperator.ofFactor(floor(Math.sqrt(weight / basis.rows()))));
        return PositiveOperator.ofFactor(HermitianPowers.columns(HermitianPowers.spectrum(sum), 0.5));
    }

    private Operator floor(double root) {
        double[] f = new double[basis.rows() * basis.rows()];
        for (int i = 0; i < basis.rows(); i++) {
            f[i * basis.rows() + i] = root;
        }
        return Operator.ofRowMajor(basis.rows(), basis.rows(), f, new double[0]);
    }

    /** The letters against one operator. */
    private final class Pairs implements LettersAgainst {

        private final List<Lazy<StatePair>> pairs = new ArrayList<>();
        private final Enclosure slack;

        /**
         * Makes the pairs.
         *
         * @param sigma the operator
         * @param slack what holds the logarithm of the factor by which its multiple of trace one may be off
         */
        Pairs(PositiveOperator sigma, Enclosure slack) {
            this(sigma, new Lazy<>(() -> SpectralState.of(sigma)), slack);
        }

        Pairs(PositiveOperator sigma, Lazy<SpectralState> spectrum, Enclosure slack) {
            this.slack = slack;
            for (int x = 0; x < outputs.size(); x++) {
                int letter = x;
                pairs.add(new Lazy<>(
                        () -> StatePair.of(sigma, spectrum.get(), outputs.get(letter), letters.get(letter))));
            }
        }

        private PetzCurve curve(int x) {
            return PetzCurve.normalised(pairs.get(x).get());
        }

        @Override
        public Enclosure psi(int x, double u) {
            return curve(x).value(u).plus(slack.times(u));
        }

        @Override
        public Optional<Tangent> tangent(int x, double u) {
            return curve(x).at(u)
                    .map(t -> new Tangent(
                            t.value().toEnclosure().plus(slack.times(u)),
                            t.slope().toEnclosure().plus(slack)));
        }

        @Override
        public Enclosure norm(int x, double u) {
            StatePair pair = pairs.get(x).get().reversed();
            return switch (pair.containment()) {
                case CERTAIN ->
                    Sandwiched.of(pair)
                            .norm(Ball.of(u))
                            .map(Ball::toEnclosure)
                            .orElse(Enclosure.unknown())
                            .max(Enclosure.ZERO);
                default -> Enclosure.of(0, Double.POSITIVE_INFINITY);
            };
        }

        @Override
        public Enclosure reversed(int x) {
            return RelativeEntropy.value(pairs.get(x).get());
        }
    }
}
