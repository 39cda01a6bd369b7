package org.minorant.core.pair;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ConcurrentHashMap;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;
import org.minorant.core.PositiveFactor;
import org.minorant.core.PositiveOperator;
import org.minorant.core.WideDouble;
import org.minorant.core.internal.number.DoubleDouble;
import org.minorant.core.internal.number.WideDoubleDouble;

/** Vectors and one operator B, prepared for products of powers: the measures of B in the vectors, on a common list of eigenvalues. */
final class KetPowers {

    private final List<SpectralMeasure> measures;
    private final List<CopyErrors.Factor> kets;
    private final CopyErrors.Factor operator;
    private final int dimension;
    private final List<WideDoubleDouble> values;
    private final Map<Integer, PowerTable[]> tables = new ConcurrentHashMap<>();

    private KetPowers(
            List<SpectralMeasure> measures, List<CopyErrors.Factor> kets, CopyErrors.Factor operator, int dimension) {
        this.measures = List.copyOf(measures);
        this.kets = List.copyOf(kets);
        this.operator = operator;
        this.dimension = dimension;
        List<WideDoubleDouble> all = new ArrayList<>();
        for (SpectralMeasure m : measures) {
            for (WideDoubleDouble v : m.values()) {
                if (!all.contains(v)) {
                    all.add(v);
                }
            }
        }
        this.values = List.copyOf(all);
    }

    /** Prepares kets and an operator; empty if B is too ill-conditioned for a useful measure. */
    static Optional<KetPowers> of(List<? extends PositiveOperator> kets, PositiveOperator b) {
        boolean diagonal = !b.isDefinedByFactor() && PairStructure.isDiagonal(b);
        double eta = 0;
        double nu = 0;
        List<SpectralMeasure> measures = new ArrayList<>();
        List<CopyErrors.Factor> models = new ArrayList<>();
        for (PositiveOperator ket : kets) {
            PositiveFactor psi = ket.factor();
            SpectralMeasure m;
            if (diagonal) {
                m = SpectralMeasure.ofDiagonal(psi, b);
            } else {
                PositiveFactor factor = b.factor().reduced();
                Optional<FactorMeasure> found = FactorMeasure.of(UnitFactor.of(psi), UnitFactor.of(factor));
                if (found.isEmpty()) {
                    return Optional.empty();
                }
                m = found.get().spectral();
                double r = found.get().relativeError();
                eta = Math.max(eta, (factor.relativeError() + r + factor.relativeError() * r) * (1 + 0x1p-50));
                nu = factor.traceError();
            }
            if (m.totalEnclosure().lowerWide().signum() <= 0) {
                throw new InvalidInputException(
                        "PairPowers",
                        "vector " + measures.size() + " is zero",
                        "vectors of positive length",
                        "leave out zero operators");
            }
            measures.add(m);
            models.add(new CopyErrors.Factor(m.totalEnclosure(), psi.relativeError(), psi.traceError(), 1));
        }
        CopyErrors.Factor other = new CopyErrors.Factor(b.traceEnclosure(), eta, nu, 1);
        return Optional.of(new KetPowers(measures, models, other, b.dimension()));
    }

    SpectralMeasure measure(int x) {
        return measures.get(x);
    }

    int dimension() {
        return dimension;
    }

    /** Refuses powers whose types or exponents are too many. */
    void check(int n) {
        Letters.checkCopies(n, values);
        TypeLattice.check(n, Math.max(1, values.size()));
    }

    /** The errors of the vectors that occur. */
    List<CopyErrors.Factor> first(int[] copies) {
        List<CopyErrors.Factor> f = new ArrayList<>();
        for (int x = 0; x < copies.length; x++) {
            if (copies[x] > 0) {
                f.add(times(kets.get(x), copies[x]));
            }
        }
        return f;
    }

    /** The errors of B^⊗n. */
    CopyErrors.Factor other(int n) {
        return times(operator, n);
    }

    private static CopyErrors.Factor times(CopyErrors.Factor f, int n) {
        return new CopyErrors.Factor(f.trace(), f.eta(), f.nu(), n);
    }

    /** The measure of B^⊗m in the m-th power of vector x, of length one, on types of n. */
    TypeLattice lattice(int x, int m, int n, double light) {
        SpectralMeasure s = measures.get(x);
        List<WideDoubleDouble> p = new ArrayList<>();
        for (WideDoubleDouble v : values) {
            int j = s.values().indexOf(v);
            p.add(j < 0 ? WideDoubleDouble.ZERO : quotient(s.weights().get(j), s.total()));
        }
        double dust =
                m * s.unresolved().dividedByUp(s.totalEnclosure().lowerWide()).toDoubleUp();
        TypeLattice l = TypeLattice.multinomial(p, m, n, s.weightError() + s.totalError() + DoubleDouble.EPS, light);
        return new TypeLattice(l.index(), l.weight(), l.error(), (l.leftOut() + dust) * (1 + 0x1p-50));
    }

    private static WideDoubleDouble quotient(WideDoubleDouble a, WideDoubleDouble b) {
        return WideDoubleDouble.of(a.significand().dividedBy(b.significand()), a.exponent() - b.exponent());
    }

    /** The points of the secular equation of a product of length one; B^⊗n known to a relative error. */
    SpectralPoints points(TypeLattice lattice, int[] copies, int n, double off) {
        PowerTable[] powers = tables.computeIfAbsent(n, this::makeTables);
        int count = lattice.index().length;
        WideArray weights = new WideArray(count);
        WideArray products = new WideArray(count);
        int[] k = new int[powers.length];
        for (int i = 0; i < count; i++) {
            WideDouble w = WideDouble.of(lattice.weight()[i]);
            weights.add(w.significand(), w.exponent());
            counts(lattice.index()[i], n, k);
            WideDouble product = WideDouble.ONE;
            for (int j = 0; j < k.length; j++) {
                product = WideDouble.of(
                        product.significand() * powers[j].significand[k[j]],
                        product.exponent() + powers[j].exponent[k[j]]);
            }
            products.add(product.significand(), product.exponent());
        }
        double valueError =
                measures.stream().mapToDouble(SpectralMeasure::valueError).max().orElse(0);
        return new SpectralPoints(
                weights,
                products,
                Enclosure.ONE,
                inKernel(copies),
                lattice.error(),
                2 * powers.length * 0x1p-53 + n * (2 * valueError + 0x1p-98) + off);
    }

    private PowerTable[] makeTables(int n) {
        PowerTable[] t = new PowerTable[values.size()];
        Arrays.setAll(t, j -> PowerTable.powers(values.get(j), 0, n));
        return t;
    }

    /** The weight of the product vector, of length one, in the kernel of B^⊗n. */
    private Enclosure inKernel(int[] copies) {
        Enclosure inSupport = Enclosure.ONE;
        for (int x = 0; x < copies.length; x++) {
            SpectralMeasure m = measures.get(x);
            if (copies[x] > 0 && m.kernelEnclosure().upperWide().signum() > 0) {
                Enclosure share = Enclosure.ONE.minus(m.kernelEnclosure().dividedBy(m.totalEnclosure()));
                inSupport = inSupport.times(share.clip(0, 1).power(copies[x]));
            }
        }
        return inSupport.equals(Enclosure.ONE)
                ? Enclosure.ZERO
                : Enclosure.ONE.minus(inSupport).clip(0, 1);
    }

    /**
     * How far two vectors are apart up to unitaries that commute with B, a bound on the trace norm of the difference of their projectors; infinite if B's eigenvalues in them are not the same.
     */
    double distance(int x, int y) {
        SpectralMeasure a = measures.get(x);
        SpectralMeasure b = measures.get(y);
        if (!a.values().equals(b.values())) {
            return Double.POSITIVE_INFINITY;
        }
        double s = square(a.kernel(), b.kernel());
        for (int j = 0; j < a.weights().size(); j++) {
            s += square(a.weights().get(j), b.weights().get(j));
        }
        // unresolved weights, and errors of 2^-45 at least of each root
        double lost = a.unresolved().plusUp(b.unresolved()).toDoubleUp()
                + a.kernelError().plusUp(b.kernelError()).toDoubleUp();
        double relative = (a.weightError() + b.weightError() + 8 * DoubleDouble.EPS)
                * a.totalEnclosure().max(b.totalEnclosure()).upper();
        double apart = Math.sqrt(2 * s)
                + 2 * Math.sqrt(lost)
                + Math.sqrt(2.0 * (a.weights().size() + 1)) * relative;
        double lengths = Math.sqrt(a.totalEnclosure().upper())
                + Math.sqrt(b.totalEnclosure().upper());
        return apart * lengths * (1 + 0x1p-40);
    }

    /** (√v − √w)², to a few 2^-52 of itself and 2^-200 of v and w. */
    private static double square(WideDoubleDouble v, WideDoubleDouble w) {
        DoubleDouble r =
                v.significand().hi() == 0 ? DoubleDouble.ZERO : v.sqrt().toDoubleDouble(0);
        DoubleDouble q =
                w.significand().hi() == 0 ? DoubleDouble.ZERO : w.sqrt().toDoubleDouble(0);
        double d = r.minus(q).hi();
        return d * d * (1 + 0x1p-45);
    }

    /** The counts that an index stands for. */
    private static void counts(int index, int n, int[] k) {
        int rest = index;
        int sum = 0;
        for (int j = 1; j < k.length; j++) {
            k[j] = rest % (n + 1);
            rest /= n + 1;
            sum += k[j];
        }
        if (k.length > 0) {
            k[0] = n - sum;
        }
    }
}
