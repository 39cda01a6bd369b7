package org.minorant.bounds;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import org.minorant.core.DensityOperator;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.PositivePair;

/** Outputs that are any matrices. The mixture's spectrum is certified to about 30 digits, so that tiny eigenvalues have their logarithms. */
final class MatrixOutputs implements ChannelOutputs {

    /** Eigenvalues below this make room for a little of the maximally mixed state. */
    private static final double THIN = 0x1p-40;

    /** The weight of the maximally mixed state where the mixture has thin directions; what it costs is this weight in nats. */
    private static final double FLOOR = 0x1p-46;

    /** Eigenvalues of the uncertified mixture are cut off here from below. */
    private static final double LEAST = 0x1p-90;

    private final List<DensityOperator> outputs;
    private final List<LetterFactor> factors = new ArrayList<>();
    private final List<EnclosedMatrix> squares = new ArrayList<>();
    private final Enclosure traces;
    private final int dimension;

    MatrixOutputs(List<DensityOperator> outputs) {
        this.outputs = outputs;
        this.dimension = outputs.get(0).dimension();
        Enclosure hull = Traces.of(outputs.get(0));
        for (DensityOperator w : outputs) {
            LetterFactor f = LetterFactor.of(w);
            factors.add(f);
            squares.add(f.columns().times(f.columns().adjoint()));
            hull = hull.hull(f.trace());
        }
        this.traces = hull;
    }

    /** Σ P(x) X_x X_x*, with its radii. */
    private EnclosedMatrix mixture(double[] p) {
        EnclosedMatrix s = EnclosedMatrix.builder(dimension, dimension).build();
        for (int x = 0; x < p.length; x++) {
            if (p[x] > 0) {
                s = s.plus(squares.get(x).times(p[x]));
            }
        }
        return s;
    }

    @Override
    public RenyiOutputs renyi() {
        return new MatrixRenyi(outputs);
    }

    @Override
    public DensityOperator mixtureState(double[] p) {
        return DensityOperator.mixture(outputs, p);
    }

    @Override
    public Slope slope(double[] p) {
        EnclosedSpectrum s = EnclosedSpectrum.of(mixture(p).midpoint());
        EnclosedMatrix bra = s.vectors().adjoint();
        double[] lambda = new double[dimension];
        for (int i = 0; i < dimension; i++) {
            lambda[i] = Math.max(LEAST, s.value(i));
        }
        int k = factors.size();
        double[] d = new double[k];
        double[][] rotated = new double[k][];
        for (int x = 0; x < k; x++) {
            EnclosedMatrix y = bra.times(factors.get(x).columns());
            EnclosedMatrix w = y.times(y.adjoint());
            d[x] = factors.get(x).purity().midpoint();
            for (int i = 0; i < dimension; i++) {
                d[x] -= w.re(i, i) * Math.log(lambda[i]);
            }
            rotated[x] = weighted(w, lambda);
        }
        double[][] curvature = new double[k][k];
        for (int x = 0; x < k; x++) {
            for (int z = 0; z <= x; z++) {
                double c = 0;
                for (int e = 0; e < rotated[x].length; e++) {
                    c += rotated[x][e] * rotated[z][e];
                }
                curvature[x][z] = c;
                curvature[z][x] = c;
            }
        }
        return new Slope(d, curvature);
    }

    /** The entries of W in the eigenbasis, times the roots of the divided differences of the logarithm. */
    private double[] weighted(EnclosedMatrix w, double[] lambda) {
        double[] r = new double[2 * dimension * dimension];
        int e = 0;
        for (int i = 0; i < dimension; i++) {
            for (int j = 0; j < dimension; j++) {
                double root = Math.sqrt(dividedDifference(lambda[i], lambda[j]));
                r[e++] = root * w.re(i, j);
                r[e++] = root * w.im(i, j);
            }
        }
        return r;
    }

    /** (ln a − ln b)/(a − b), 1/a where they are equal. */
    private static double dividedDifference(double a, double b) {
        double ratio = (a - b) / b;
        if (Math.abs(ratio) < 0.5) {
            return Math.abs(ratio) < 1e-17 ? 1 / b : Math.log1p(ratio) / ratio / b;
        }
        return (Math.log(a) - Math.log(b)) / (a - b);
    }

    @Override
    public CapacityCertificate certify(double[] p) {
        EnclosedMatrix mixture = mixture(p);
        EnclosedMatrix middle = mixture.midpoint();
        EnclosedSpectrum s = EnclosedSpectrum.of(middle);
        // S is this matrix of exact numbers; the mixture ρ is close to it, in trace norm
        double distance = Math.sqrt(dimension) * mixture.minus(middle).frobeniusUpper();
        List<Enclosure> purities = new ArrayList<>();
        for (int x = 0; x < p.length; x++) {
            distance += p[x] * factors.get(x).error();
            purities.add(factors.get(x).purity());
        }
        distance *= 1 + (p.length + 4) * 0x1p-50;
        Enclosure weight = Traces.sum(p).times(traces);
        Enclosure entropy = entropy(s, distance, weight);
        if (!(s.value(0) > THIN)) {
            middle = middle.plus(EnclosedMatrix.identity(dimension).times(FLOOR / dimension))
                    .midpoint();
            s = EnclosedSpectrum.of(middle);
        }
        return LogarithmOfState.of(s, middle.traceRe())
                .certificate(factors, p, distance, weight)
                .intersect(entropy.plus(CapacityCertificate.mean(p, purities)));
    }

    /** The entropy of the mixture of normalised letters: its eigenvalues are those of ρ over the weight, and those of ρ are close to those of S. */
    private static Enclosure entropy(EnclosedSpectrum s, double distance, Enclosure weight) {
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < s.dimension(); i++) {
            Enclosure lambda = s.eigenvalue(i).widen(distance).dividedBy(weight);
            sum = sum.minus(EntropyTerm.of(lambda.clip(0, 1)));
        }
        return sum;
    }

    @Override
    public LetterCurves against(int[] letters, DensityOperator sigma) {
        List<PositivePair> pairs = new ArrayList<>();
        for (int x : letters) {
            pairs.add(PositivePair.of(outputs.get(x), sigma));
        }
        return new LetterCurves(pairs, traces, Traces.of(sigma));
    }

    @Override
    public LetterCurves againstMixture(int[] letters, double[] q) {
        DensityOperator mixture = mixtureState(q);
        List<PositivePair> pairs = new ArrayList<>();
        for (int x : letters) {
            pairs.add(PositivePair.of(outputs.get(x), mixture));
        }
        return new LetterCurves(pairs, traces, Traces.sum(q).times(traces));
    }

    @Override
    public WordCurves words(double[] p, int n) {
        int[] used = IntStream.range(0, p.length).filter(x -> p[x] > 0).toArray();
        List<DensityOperator> letters =
                Arrays.stream(used).mapToObj(outputs::get).toList();
        List<LetterFactor> columns = Arrays.stream(used).mapToObj(factors::get).toList();
        double[] weights = Arrays.stream(used).mapToDouble(x -> p[x]).toArray();
        SymmetricWords words = new SymmetricWords(letters, columns, traces, n);
        DensityOperator mixture = mixtureState(p);
        if (words.areTwoKets() && weights[0] == weights[1]) {
            return words.ofTwoKets(mixture, Traces.sum(p));
        }
        return words.areAlike(mixture)
                ? words.against(mixture, Traces.sum(p).times(traces))
                : new QuantumWords(letters, traces, n).mean(weights, mixture);
    }

    @Override
    public WordCurves wordsAgainst(DensityOperator sigma, int n) {
        return wordsAgainst(sigma, Traces.of(sigma), n);
    }

    private WordCurves wordsAgainst(DensityOperator sigma, Enclosure trace, int n) {
        SymmetricWords words = new SymmetricWords(outputs, factors, traces, n);
        return words.areAlike(sigma)
                ? words.against(sigma, trace)
                : new QuantumWords(outputs, traces, n).against(sigma, trace);
    }

    @Override
    public WordCurves wordsAgainstMixture(double[] q, int n) {
        SymmetricWords words = new SymmetricWords(outputs, factors, traces, n);
        DensityOperator mixture = mixtureState(q);
        return words.areTwoKets() && q[0] == q[1]
                ? words.ofTwoKets(mixture, Traces.sum(q))
                : wordsAgainst(mixture, Traces.sum(q).times(traces), n);
    }

    @Override
    public TypedWords typed(double[] q, int n) {
        return new QuantumWords(outputs, traces, n)
                .typed(mixtureState(q), Traces.sum(q).times(traces));
    }

    @Override
    public TypeCost typeCost() {
        boolean kets = outputs.stream()
                .allMatch(w -> w.isDefinedByFactor() && w.factor().rank() == 1);
        return kets ? TypeCost.EQUATIONS : TypeCost.BLOCKS;
    }
}
