package org.minorant.bounds;

import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;
import org.minorant.core.KrausChannel;
import org.minorant.core.Operator;
import org.minorant.core.WideDouble;

/**
 * What one input ρ proves of the assisted capacity: from below I(ρ) = S(ρ) + S(N(ρ)) − S(N^c(ρ)), N^c the complementary channel, from above the largest eigenvalue of
 *
 * <pre>G = −ln ρ₀ − N*(ln σ) + N^c*(ln τ),   any ρ₀ &gt; 0, any state σ, any τ ≥ N^c(ρ₀).</pre>
 *
 * <p><b>Argument.</b> Let ω be any input. S(N(ω)) ≤ −Tr N(ω) ln σ (Klein). S(ω) − S(N^c(ω)) is the conditional entropy of the output given the environment, concave and homogeneous in ω; so it is at most its
 * tangent at ρ₀, −Tr ω ln ρ₀ + Tr N^c(ω) ln N^c(ρ₀), and the logarithm is operator monotone. Together I(ω) ≤ Tr ωG. With ρ₀ = ρ the best input, the two ends meet: this is the condition of optimality of a
 * concave function.
 *
 * <p><b>Trace defect.</b> If S = ΣK*K misses the identity by δ, the channel meant has the Kraus operators KS^(−½). At the input S^½ρS^½ its output and environment are N(ρ) and N^c(ρ); eigenvalues of the input
 * change by δ relatively, ln ρ₀ by 2.1δ/min ρ₀, and an adjoint image of H by 2.2δ‖H‖.
 *
 * @param below an enclosure of I(ρ)
 * @param above an upper end of the capacity
 */
record AssistedCapacityCertificate(Enclosure below, WideDouble above) {

    /** Eigenvalues below this make room for a little of the identity. */
    private static final double THIN = 0x1p-40;

    /** What is added to thin matrices: in nats, about what it costs. */
    private static final double FLOOR = 0x1p-46;

    private static final double UP = 1 + 0x1p-40;

    static AssistedCapacityCertificate of(KrausChannel channel, AssistedInput input) {
        List<Operator> kraus = channel.krausOperators();
        List<Operator> rows = channel.complementary().krausOperators();
        EnclosedMatrix rho = input.matrix();
        EnclosedMatrix sigma = image(kraus, rho);
        EnclosedMatrix tau = image(rows, rho);
        double defect = channel.traceDefect();
        Enclosure trace = sigma.traceRe();
        Enclosure below = entropy(rho, trace, defect)
                .plus(entropy(sigma, trace, 0))
                .minus(entropy(tau, trace, 0))
                .max(Enclosure.ZERO);
        return new AssistedCapacityCertificate(below, above(kraus, rows, rho, sigma, defect));
    }

    double gap() {
        return above.plusUp(below.lowerWide().negate()).toDoubleUp();
    }

    private static WideDouble above(
            List<Operator> kraus, List<Operator> rows, EnclosedMatrix rho, EnclosedMatrix sigma, double defect) {
        EnclosedMatrix base = raised(rho, 0);
        EnclosedMatrix environment = image(rows, base);
        MatrixLogarithm lnRho = MatrixLogarithm.of(base);
        EnclosedMatrix state = raised(sigma, 0);
        MatrixLogarithm lnSigma = MatrixLogarithm.of(state);
        double radius = environment.minus(environment.midpoint()).frobeniusUpper();
        MatrixLogarithm lnTau = MatrixLogarithm.of(raised(environment, radius));
        double norms = lnSigma.norm() + lnTau.norm();
        double error = lnRho.error() + (lnSigma.error() + lnTau.error()) * (1 + defect);
        double slack = 2.1 * defect / lnRho.least() + 2.2 * defect * norms;
        if (!(error + slack < Double.POSITIVE_INFINITY)) {
            return WideDouble.POSITIVE_INFINITY;
        }
        EnclosedMatrix g = adjointImage(rows, lnTau.matrix())
                .minus(adjointImage(kraus, lnSigma.matrix()))
                .minus(lnRho.matrix());
        EnclosedSpectrum s = EnclosedSpectrum.of(g);
        return s.eigenvalue(s.dimension() - 1)
                .plus(state.traceRe().ln())
                .widen((error + slack) * UP)
                .upperWide();
    }

    /** Exact numbers near S: at least S, if its radius is given, and not thin. */
    private static EnclosedMatrix raised(EnclosedMatrix s, double radius) {
        EnclosedMatrix middle = s.midpoint();
        double least = EnclosedSpectrum.of(middle).value(0);
        double by = 2 * radius + (least > THIN ? 0 : FLOOR);
        return by == 0
                ? middle
                : middle.plus(EnclosedMatrix.identity(s.rows()).times(by)).midpoint();
    }

    /** Σ K A K*. */
    static EnclosedMatrix image(List<Operator> kraus, EnclosedMatrix a) {
        EnclosedMatrix sum =
                EnclosedMatrix.builder(kraus.get(0).rows(), kraus.get(0).rows()).build();
        for (Operator operator : kraus) {
            EnclosedMatrix k = EnclosedMatrix.of(operator);
            sum = sum.plus(k.times(a).times(k.adjoint()));
        }
        return sum;
    }

    private static EnclosedMatrix adjointImage(List<Operator> kraus, EnclosedMatrix b) {
        return image(kraus.stream().map(Operator::adjoint).toList(), b);
    }

    /** The entropy of A/trace, its eigenvalues known within a relative error more. */
    private static Enclosure entropy(EnclosedMatrix a, Enclosure trace, double relative) {
        EnclosedSpectrum s = EnclosedSpectrum.of(a);
        Enclosure factor = Enclosure.ONE.widen(relative);
        Enclosure sum = Enclosure.ZERO;
        for (int i = 0; i < s.dimension(); i++) {
            Enclosure lambda = s.eigenvalue(i).times(factor).dividedBy(trace).clip(0, 1);
            sum = sum.minus(EntropyTerm.of(lambda));
        }
        return sum;
    }
}
