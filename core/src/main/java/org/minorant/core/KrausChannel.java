package org.minorant.core;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.internal.message.Checks;

/**
 * A quantum channel by its Kraus operators: Φ(A) = Σ_k K_k A K_k*, with Σ_k K_k* K_k = 1, each K_k an output × input matrix.
 *
 * <p><b>Which map is meant.</b> That of exactly these numbers. Doubles seldom add up to the identity exactly: {@link #traceDefect()} bounds ‖Σ K*K − 1‖_F, {@link #of}
 * accepts d · 2^-48 for inputs of dimension d, and traces of outputs differ from those of inputs by at most that, relatively.
 *
 * <p><b>Positive operators</b> are mapped as the operators meant; their factors become (K_1 X, K_2 X, …) with the accuracy said at {@link
 * PositiveOperator#conjugatedBy}. The list of Kraus operators is used as given: nothing reduces it silently.
 *
 * <p>Immutable and thread-safe. Source: K. Kraus, States, Effects, and Operations, Springer 1983 (from memory).
 */
public final class KrausChannel {

    private static final double ROUNDING = 0x1p-48;

    private final List<Operator> kraus;
    private final double traceDefect;

    private KrausChannel(List<Operator> kraus, double traceDefect) {
        this.kraus = kraus;
        this.traceDefect = traceDefect;
    }

    /**
     * Returns the channel with these Kraus operators.
     *
     * @param kraus matrices of one shape, output × input, at least one
     * @return the channel
     * @throws InvalidInputException if there is none, shapes differ, or ‖Σ K*K − 1‖_F exceeds d · 2^-48
     */
    public static KrausChannel of(List<? extends Operator> kraus) {
        String asked = "KrausChannel.of";
        List<Operator> list = checked(asked, kraus);
        double defect = defect(list);
        double tolerance = list.get(0).columns() * ROUNDING;
        if (!(defect <= tolerance)) {
            throw new InvalidInputException(
                    asked,
                    "the sum of K*K differs from the identity by " + defect + " in Hilbert-Schmidt norm",
                    "at most " + tolerance,
                    "use KrausChannel.nearest, which repairs and says by how much");
        }
        return new KrausChannel(list, defect);
    }

    /**
     * Returns the channel with these Kraus operators.
     *
     * @param kraus matrices of one shape, output × input, at least one
     * @return the channel
     * @throws InvalidInputException as {@link #of(List)}
     */
    public static KrausChannel of(Operator... kraus) {
        return of(List.of(kraus));
    }

    /**
     * Returns the channel with Kraus operators K S^(−½), S = Σ K*K: the closest list of that form to the given one, and the one that keeps the direction of
     * what every input state becomes.
     *
     * @param kraus matrices of one shape, output × input, at least one
     * @return the channel, and by how much the given list missed the identity
     * @throws InvalidInputException if there is none, shapes differ, or Σ K*K is singular up to {@link Tolerance#ROUNDING}
     */
    public static RepairedChannel nearest(List<? extends Operator> kraus) {
        String asked = "KrausChannel.nearest";
        List<Operator> list = checked(asked, kraus);
        double before = defect(list);
        // the second pass removes what rounding of the first left
        for (int pass = 0; pass < 2; pass++) {
            SpectralDecomposition s = SpectralDecomposition.of(normalisation(list));
            if (s.rank(Tolerance.ROUNDING) < s.dimension()) {
                throw new InvalidInputException(
                        asked,
                        "the sum of K*K has the eigenvalue " + s.eigenvalues()[0],
                        "a positive definite sum",
                        "some input is mapped to nothing: add a Kraus operator for it");
            }
            Operator root = s.apply(x -> 1 / Math.sqrt(x));
            List<Operator> next = new ArrayList<>();
            for (Operator k : list) {
                next.add(k.times(root));
            }
            list = List.copyOf(next);
        }
        return new RepairedChannel(of(list), before);
    }

    private static List<Operator> checked(String asked, List<? extends Operator> kraus) {
        if (kraus.isEmpty()) {
            throw new InvalidInputException(asked, "there is no Kraus operator", "at least one", "give the list");
        }
        List<Operator> list = List.copyOf(kraus);
        for (Operator k : list) {
            Checks.equalShapes(asked, list.get(0), k);
        }
        return list;
    }

    /** An upper end of ‖Σ K*K − 1‖_F. */
    private static double defect(List<Operator> kraus) {
        EnclosedMatrix sum = EnclosedMatrix.identity(kraus.get(0).columns()).times(-1);
        for (Operator operator : kraus) {
            EnclosedMatrix k = EnclosedMatrix.of(operator);
            sum = sum.plus(k.adjoint().times(k));
        }
        return sum.frobeniusUpper();
    }

    private static HermitianOperator normalisation(List<Operator> kraus) {
        int n = kraus.get(0).columns();
        Operator sum = Operator.ofRowMajor(n, n, new double[n * n], new double[0]);
        for (Operator k : kraus) {
            sum = sum.plus(k.adjoint().times(k));
        }
        return HermitianPart.nearest(sum);
    }

    /** Takes over operators that make a channel by a theorem; their defect is worked out, not refused. */
    private static KrausChannel trusted(List<Operator> kraus) {
        return new KrausChannel(List.copyOf(kraus), defect(kraus));
    }

    /**
     * Returns the dimension of inputs.
     *
     * @return the number of columns of the Kraus operators
     */
    public int inputDimension() {
        return kraus.get(0).columns();
    }

    /**
     * Returns the dimension of outputs.
     *
     * @return the number of rows of the Kraus operators
     */
    public int outputDimension() {
        return kraus.get(0).rows();
    }

    /**
     * Returns the Kraus operators.
     *
     * @return an immutable list, as given or computed
     */
    public List<Operator> krausOperators() {
        return List.copyOf(kraus);
    }

    /**
     * Returns how far the Kraus operators miss trace preservation.
     *
     * @return an upper end of ‖Σ K*K − 1‖_F
     */
    public double traceDefect() {
        return traceDefect;
    }

    /**
     * Returns Φ(A) for any operator.
     *
     * @param a an operator on the input space
     * @return Σ K A K*, computed in double: each entry within (2n+m+6) · 2^-51 · Σ|K||A||K*| of the exact one, for m Kraus operators
     * @throws InvalidInputException if the shape does not fit or an entry overflows
     */
    public Operator apply(Operator a) {
        return KrausSum.apply("KrausChannel.apply", kraus, a);
    }

    /**
     * Returns Φ(A) for a Hermitian operator, which is Hermitian.
     *
     * @param a an operator on the input space
     * @return Σ K A K*, as {@link #apply(Operator)}
     * @throws InvalidInputException if the dimension does not fit or an entry overflows
     */
    public HermitianOperator apply(HermitianOperator a) {
        return KrausSum.apply("KrausChannel.apply", kraus, a);
    }

    /**
     * Returns Φ(A) for a positive operator, which is positive: the image of the operator meant.
     *
     * @param a an operator on the input space
     * @return Σ K A K*
     * @throws InvalidInputException if the dimension does not fit
     */
    public PositiveOperator apply(PositiveOperator a) {
        return KrausSum.apply("KrausChannel.apply", kraus, a);
    }

    /**
     * Returns the output state.
     *
     * @param state a state of the input system
     * @return Σ K ρ K*, of trace one up to the defects of the channel and the state
     * @throws InvalidInputException if the dimension does not fit
     */
    public DensityOperator apply(DensityOperator state) {
        return DensityOperator.trusted(apply((PositiveOperator) state));
    }

    /**
     * Returns Φ*(B) for any operator, the adjoint map of the Heisenberg picture: Tr Φ(A) B = Tr A Φ*(B).
     *
     * @param b an operator on the output space
     * @return Σ K* B K, with the accuracy of {@link #apply(Operator)}
     * @throws InvalidInputException if the shape does not fit or an entry overflows
     */
    public Operator applyAdjoint(Operator b) {
        return KrausSum.apply("KrausChannel.applyAdjoint", adjoints(), b);
    }

    /**
     * Returns Φ*(B) for a Hermitian operator, an observable.
     *
     * @param b an operator on the output space
     * @return Σ K* B K
     * @throws InvalidInputException if the dimension does not fit or an entry overflows
     */
    public HermitianOperator applyAdjoint(HermitianOperator b) {
        return KrausSum.apply("KrausChannel.applyAdjoint", adjoints(), b);
    }

    /**
     * Returns Φ*(B) for a positive operator, an effect of a measurement say: the image of the operator meant.
     *
     * @param b an operator on the output space
     * @return Σ K* B K
     * @throws InvalidInputException if the dimension does not fit
     */
    public PositiveOperator applyAdjoint(PositiveOperator b) {
        return KrausSum.apply("KrausChannel.applyAdjoint", adjoints(), b);
    }

    private List<Operator> adjoints() {
        return kraus.stream().map(Operator::adjoint).toList();
    }

    /**
     * Returns the Choi operator Σ_ij |i⟩⟨j| ⊗ Φ(|i⟩⟨j|), on input ⊗ output, unnormalised: its trace is the dimension of inputs. It is Σ_k |K_k⟩⟩⟨⟨K_k| with the columns of K
     * one below the other, which is its factor, exactly.
     *
     * @return the Choi operator
     * @throws InvalidInputException if it is too large for memory
     */
    public PositiveOperator choiOperator() {
        int in = inputDimension();
        int out = outputDimension();
        long n = (long) in * out;
        Checks.dimensions("KrausChannel.choiOperator", n, Math.max(n, kraus.size()));
        double[] re = new double[(int) n * kraus.size()];
        double[] im = new double[re.length];
        for (int k = 0; k < kraus.size(); k++) {
            for (int i = 0; i < in; i++) {
                for (int o = 0; o < out; o++) {
                    re[(i * out + o) * kraus.size() + k] = kraus.get(k).re(o, i);
                    im[(i * out + o) * kraus.size() + k] = kraus.get(k).im(o, i);
                }
            }
        }
        return PositiveOperator.ofFactor(new Operator((int) n, kraus.size(), re, im));
    }

    /**
     * Returns the composition: first this channel, then the other. Its Kraus operators are all products, rounded once, as many as the product of the two numbers.
     *
     * @param next a channel whose inputs are the outputs of this one
     * @return next ∘ this
     * @throws InvalidInputException if the dimensions do not fit
     */
    public KrausChannel then(KrausChannel next) {
        if (next.inputDimension() != outputDimension()) {
            throw new InvalidInputException(
                    "KrausChannel.then",
                    "the next channel takes inputs of dimension " + next.inputDimension(),
                    outputDimension() + ", as the outputs of the first",
                    "check the order of the channels");
        }
        checkSize("KrausChannel.then", next, (long) next.outputDimension() * inputDimension());
        List<Operator> products = new ArrayList<>();
        for (Operator b : next.kraus) {
            for (Operator a : kraus) {
                products.add(b.times(a));
            }
        }
        return trusted(products);
    }

    /**
     * Returns the channel on two systems that acts independently on each.
     *
     * @param other the channel of the second system
     * @return this ⊗ other, with Kraus operators K ⊗ L
     * @throws InvalidInputException if they are too large for memory
     */
    public KrausChannel tensor(KrausChannel other) {
        long rows = (long) outputDimension() * other.outputDimension();
        Checks.dimensions("KrausChannel.tensor", rows, (long) inputDimension() * other.inputDimension());
        checkSize("KrausChannel.tensor", other, rows * inputDimension() * other.inputDimension());
        List<Operator> products = new ArrayList<>();
        for (Operator a : kraus) {
            for (Operator b : other.kraus) {
                products.add(a.tensor(b));
            }
        }
        return trusted(products);
    }

    /** Refuses more products of Kraus operators than memory holds, counted as rows of their entries. */
    private void checkSize(String asked, KrausChannel other, long entries) {
        Checks.dimensions(
                asked + ", all products of Kraus operators", (long) kraus.size() * other.kraus.size(), entries);
    }

    /**
     * Returns the complementary channel, to the environment: A ↦ Σ_kl Tr(K_k A K_l*) |k⟩⟨l|. Its Kraus operators are the o-th rows of all K_k, for each output o.
     *
     * @return a complementary channel, with outputs of as many dimensions as there are Kraus operators here
     */
    public KrausChannel complementary() {
        int in = inputDimension();
        List<Operator> rows = new ArrayList<>();
        for (int o = 0; o < outputDimension(); o++) {
            double[] re = new double[kraus.size() * in];
            double[] im = new double[re.length];
            for (int k = 0; k < kraus.size(); k++) {
                for (int i = 0; i < in; i++) {
                    re[k * in + i] = kraus.get(k).re(o, i);
                    im[k * in + i] = kraus.get(k).im(o, i);
                }
            }
            rows.add(new Operator(kraus.size(), in, re, im));
        }
        return trusted(rows);
    }

    @Override
    public String toString() {
        return "KrausChannel from dimension " + inputDimension() + " to " + outputDimension() + ", " + kraus.size()
                + " Kraus operators";
    }
}
