package org.minorant.core;

import java.util.Arrays;
import java.util.OptionalInt;
import org.minorant.core.internal.message.Checks;

/**
 * How a space is a tensor product: the dimensions of its subsystems, in order. Subsystems are counted from 0; the index of the last one runs fastest, as in
 * {@link Operator#tensor}.
 *
 * <pre>
 * TensorLayout layout = TensorLayout.of(2, 3);
 * DensityOperator first = layout.partialTrace(state, 1);      // what is left when subsystem 1 is traced over
 * </pre>
 *
 * <p><b>Types.</b> The partial trace of a state is a state and of a positive operator positive; the partial transpose is only Hermitian; a permutation keeps
 * the type. For positive operators all this is meant of the operators meant, and factors are kept, without further error.
 *
 * <p>Immutable and thread-safe.
 */
public final class TensorLayout {

    private final int[] dimensions;
    private final int total;

    private TensorLayout(int[] dimensions, int total) {
        this.dimensions = dimensions;
        this.total = total;
    }

    /**
     * Returns the layout with these subsystems.
     *
     * @param dimensions the dimension of each subsystem, at least 1, in order; at least one subsystem
     * @return the layout
     * @throws InvalidInputException if there is no subsystem, a dimension is below 1, or an operator on the product would be too large for memory
     */
    public static TensorLayout of(int... dimensions) {
        String asked = "TensorLayout.of";
        if (dimensions.length == 0) {
            throw new InvalidInputException(
                    asked, "there is no subsystem", "at least one dimension", "give one dimension per subsystem");
        }
        long total = 1;
        for (int i = 0; i < dimensions.length; i++) {
            if (dimensions[i] < 1) {
                throw new InvalidInputException(
                        asked, "dimension " + i + " is " + dimensions[i], "at least 1", "check the dimensions");
            }
            total *= dimensions[i];
            Checks.dimensions(asked, total, total);
        }
        return new TensorLayout(dimensions.clone(), (int) total);
    }

    /**
     * Returns the dimension of the whole space.
     *
     * @return the product of the subsystems' dimensions
     */
    public int dimension() {
        return total;
    }

    /**
     * Returns the number of subsystems.
     *
     * @return how many there are
     */
    public int subsystems() {
        return dimensions.length;
    }

    /**
     * Returns the dimension of one subsystem.
     *
     * @param subsystem its number, from 0
     * @return its dimension
     * @throws InvalidInputException if there is no such subsystem
     */
    public int dimension(int subsystem) {
        checkIndex("TensorLayout.dimension", subsystem);
        return dimensions[subsystem];
    }

    /**
     * Returns the layout of what is left when subsystems are traced over.
     *
     * @param traced their numbers, distinct
     * @return the other subsystems in order; one of dimension 1 if none is left
     * @throws InvalidInputException if a number is out of range or occurs twice
     */
    public TensorLayout without(int... traced) {
        boolean[] chosen = chosen("TensorLayout.without", traced);
        int[] left = new int[dimensions.length - traced.length];
        int size = 1;
        int k = 0;
        for (int i = 0; i < dimensions.length; i++) {
            if (!chosen[i]) {
                left[k++] = dimensions[i];
                size *= dimensions[i];
            }
        }
        return new TensorLayout(left.length == 0 ? new int[] {1} : left, size);
    }

    /**
     * Returns the layout after a permutation of subsystems.
     *
     * @param order subsystem k of the result is subsystem order[k] of this layout
     * @return the permuted layout
     * @throws InvalidInputException if the numbers are not a permutation of 0, 1, …
     */
    public TensorLayout permuted(int... order) {
        checkPermutation("TensorLayout.permuted", order);
        return new TensorLayout(Arrays.stream(order).map(i -> dimensions[i]).toArray(), total);
    }

    /**
     * Returns the partial trace: Σ_t (1 ⊗ ⟨t|) A (1 ⊗ |t⟩) over a basis of the traced subsystems. Entries are summed in double-double and rounded once.
     *
     * @param a an operator on the whole space
     * @param traced the subsystems to trace over, distinct
     * @return the operator on the others, in order
     * @throws InvalidInputException if the operator has another dimension, or a number is out of range or occurs twice
     */
    public Operator partialTrace(Operator a, int... traced) {
        SubsystemTrace t = trace("TensorLayout.partialTrace", a, traced);
        return new Operator(t.kept(), t.kept(), t.re(a), t.im(a));
    }

    /**
     * Returns the partial trace of a Hermitian operator, which is Hermitian; see {@link #partialTrace(Operator, int...)}.
     *
     * @param a a Hermitian operator on the whole space
     * @param traced the subsystems to trace over, distinct
     * @return the operator on the others, in order
     * @throws InvalidInputException as {@link #partialTrace(Operator, int...)}
     */
    public HermitianOperator partialTrace(HermitianOperator a, int... traced) {
        return new HermitianOperator(partialTrace((Operator) a, traced));
    }

    /**
     * Returns the partial trace of a positive operator, which is positive: that of the operator meant. Its factor is (1 ⊗ ⟨t|)X for all t, side by side,
     * without further error.
     *
     * @param a a positive operator on the whole space
     * @param traced the subsystems to trace over, distinct
     * @return the operator on the others, in order
     * @throws InvalidInputException as {@link #partialTrace(Operator, int...)}
     */
    public PositiveOperator partialTrace(PositiveOperator a, int... traced) {
        SubsystemTrace t = trace("TensorLayout.partialTrace", a, traced);
        int copies = t.traced();
        OptionalInt known = a.knownColumns();
        OptionalInt columns = known.isEmpty()
                ? known
                : OptionalInt.of((int) Math.min(Integer.MAX_VALUE, (long) copies * known.getAsInt()));
        // the partial trace does not increase the trace norm
        return new PositiveOperator(
                new Operator(t.kept(), t.kept(), t.re(a), t.im(a)),
                (t.roundingTraceNorm(a) + a.entryDefect()) * (1 + 0x1p-50),
                FactorSource.later(
                        () -> FactorShapes.moved(a.factor(), t.kept(), copies, t.keptIndex(), t.tracedIndex()),
                        columns));
    }

    /**
     * Returns the partial trace of a state, which is the state of what is left; see {@link #partialTrace(PositiveOperator, int...)}.
     *
     * @param state a state of the whole system
     * @param traced the subsystems to trace over, distinct
     * @return the state of the others, in order
     * @throws InvalidInputException as {@link #partialTrace(Operator, int...)}
     */
    public DensityOperator partialTrace(DensityOperator state, int... traced) {
        return DensityOperator.trusted(partialTrace((PositiveOperator) state, traced));
    }

    /**
     * Returns the partial transpose: transposes the chosen subsystems only, exactly.
     *
     * @param a an operator on the whole space
     * @param transposed the subsystems to transpose, distinct
     * @return the partial transpose, on the same space
     * @throws InvalidInputException if the operator has another dimension, or a number is out of range or occurs twice
     */
    public Operator partialTranspose(Operator a, int... transposed) {
        String asked = "TensorLayout.partialTranspose";
        checkShape(asked, a);
        int[] part = SubsystemIndex.part(dimensions, total, chosen(asked, transposed));
        double[] re = new double[total * total];
        double[] im = new double[a.isReal() ? 0 : re.length];
        for (int i = 0; i < total; i++) {
            for (int j = 0; j < total; j++) {
                int to = (i - part[i] + part[j]) * total + j - part[j] + part[i];
                re[to] = a.re(i, j);
                if (im.length != 0) {
                    im[to] = a.im(i, j);
                }
            }
        }
        return new Operator(total, total, re, im);
    }

    /**
     * Returns the partial transpose of a Hermitian operator, which is Hermitian but need not be positive if that was; for a positive operator it is that of
     * its entries.
     *
     * @param a a Hermitian operator on the whole space
     * @param transposed the subsystems to transpose, distinct
     * @return the partial transpose, on the same space
     * @throws InvalidInputException as {@link #partialTranspose(Operator, int...)}
     */
    public HermitianOperator partialTranspose(HermitianOperator a, int... transposed) {
        return new HermitianOperator(partialTranspose((Operator) a, transposed));
    }

    /**
     * Returns an operator with its subsystems in another order, exactly.
     *
     * @param a an operator on the whole space
     * @param order subsystem k of the result is subsystem order[k] of this layout
     * @return the same operator on the space with layout {@link #permuted}
     * @throws InvalidInputException if the operator has another dimension or the numbers are not a permutation of 0, 1, …
     */
    public Operator permute(Operator a, int... order) {
        String asked = "TensorLayout.permute";
        checkShape(asked, a);
        checkPermutation(asked, order);
        int[] to = SubsystemIndex.permuted(dimensions, total, order);
        double[] re = new double[total * total];
        double[] im = new double[a.isReal() ? 0 : re.length];
        for (int i = 0; i < total; i++) {
            for (int j = 0; j < total; j++) {
                re[to[i] * total + to[j]] = a.re(i, j);
                if (im.length != 0) {
                    im[to[i] * total + to[j]] = a.im(i, j);
                }
            }
        }
        return new Operator(total, total, re, im);
    }

    /**
     * Returns a Hermitian operator with its subsystems in another order; see {@link #permute(Operator, int...)}.
     *
     * @param a a Hermitian operator on the whole space
     * @param order subsystem k of the result is subsystem order[k] of this layout
     * @return the same operator on the permuted space
     * @throws InvalidInputException as {@link #permute(Operator, int...)}
     */
    public HermitianOperator permute(HermitianOperator a, int... order) {
        return new HermitianOperator(permute((Operator) a, order));
    }

    /**
     * Returns a positive operator with its subsystems in another order, and its factor with rows in that order; see {@link #permute(Operator, int...)}.
     *
     * @param a a positive operator on the whole space
     * @param order subsystem k of the result is subsystem order[k] of this layout
     * @return the same operator on the permuted space
     * @throws InvalidInputException as {@link #permute(Operator, int...)}
     */
    public PositiveOperator permute(PositiveOperator a, int... order) {
        Operator entries = permute((Operator) a, order);
        int[] to = SubsystemIndex.permuted(dimensions, total, order);
        return new PositiveOperator(
                entries,
                a.entryDefect(),
                FactorSource.later(
                        () -> FactorShapes.moved(a.factor(), total, 1, to, new int[total]), a.knownColumns()),
                a.isDefinedByFactor());
    }

    /**
     * Returns a state with its subsystems in another order; see {@link #permute(PositiveOperator, int...)}.
     *
     * @param state a state of the whole system
     * @param order subsystem k of the result is subsystem order[k] of this layout
     * @return the same state of the permuted system
     * @throws InvalidInputException as {@link #permute(Operator, int...)}
     */
    public DensityOperator permute(DensityOperator state, int... order) {
        return DensityOperator.trusted(permute((PositiveOperator) state, order));
    }

    private SubsystemTrace trace(String asked, Operator a, int[] traced) {
        checkShape(asked, a);
        return SubsystemTrace.of(dimensions, total, chosen(asked, traced));
    }

    private void checkShape(String asked, Operator a) {
        if (a.rows() != total || a.columns() != total) {
            throw new InvalidInputException(
                    asked,
                    "the operator is " + a.rows() + " x " + a.columns(),
                    total + " x " + total + ", as the layout " + this,
                    "check the dimensions of the subsystems");
        }
    }

    private void checkIndex(String asked, int subsystem) {
        if (subsystem < 0 || subsystem >= dimensions.length) {
            throw new InvalidInputException(
                    asked,
                    "there is no subsystem " + subsystem,
                    "a number from 0 to " + (dimensions.length - 1),
                    "subsystems are counted from 0");
        }
    }

    private boolean[] chosen(String asked, int[] subsystems) {
        boolean[] chosen = new boolean[dimensions.length];
        for (int s : subsystems) {
            checkIndex(asked, s);
            if (chosen[s]) {
                throw new InvalidInputException(
                        asked, "subsystem " + s + " occurs twice", "distinct numbers", "name each subsystem once");
            }
            chosen[s] = true;
        }
        return chosen;
    }

    private void checkPermutation(String asked, int[] order) {
        chosen(asked, order);
        if (order.length != dimensions.length) {
            throw new InvalidInputException(
                    asked,
                    "the order has " + order.length + " numbers",
                    dimensions.length + ", one for each subsystem",
                    "name every subsystem once");
        }
    }

    @Override
    public boolean equals(Object o) {
        return o instanceof TensorLayout t && Arrays.equals(dimensions, t.dimensions);
    }

    @Override
    public int hashCode() {
        return Arrays.hashCode(dimensions);
    }

    @Override
    public String toString() {
        StringBuilder s = new StringBuilder();
        for (int d : dimensions) {
            s.append(s.length() == 0 ? "" : " x ").append(d);
        }
        return s.toString();
    }
}
