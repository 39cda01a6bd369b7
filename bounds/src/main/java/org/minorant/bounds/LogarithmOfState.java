package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.Enclosure;

/**
 * The logarithm of a positive definite matrix S ≈ VΛV*, and relative entropies to the state S/Tr S.
 *
 * <p><b>Argument.</b> Let V = U(1+Δ)^½ with U unitary, ‖Δ‖ at most the defect δ &lt; ½, so ‖V − U‖ ≤ 0.6δ and ‖V‖ ≤ 1.25. Then ‖S − UΛU*‖ ≤ r = residual + 2δ
 * max Λ. Both have eigenvalues of at least m = min Λ − r, so the logarithms differ by at most r/m. Replacing U by V in Tr XX* U ln Λ U* costs at
 * most 2δ max|ln Λ| Tr XX*, and W differs from XX* by a known amount in trace norm, times the norm of ln S.
 */
final class LogarithmOfState {

    private static final double UP = 1 + 0x1p-40;

    private final EnclosedMatrix bra;
    private final Enclosure[] logarithms;
    private final Enclosure lnTrace;
    /** A bound on ‖ln S − U ln Λ U*‖. */
    private final double distance;

    private final double defect;
    /** A bound on ‖ln Λ‖. */
    private final double norm;
    /** A lower bound on the eigenvalues of S; not positive if none is known. */
    private final double least;

    private LogarithmOfState(EnclosedSpectrum s, Enclosure trace) {
        int n = s.dimension();
        bra = s.vectors().adjoint();
        lnTrace = trace.ln();
        defect = s.defect();
        double most = Math.max(Math.abs(s.value(0)), Math.abs(s.value(n - 1)));
        double r = (s.residual() + 2 * defect * most) * UP;
        least = defect < 0.5 ? s.value(0) * (1 - 0x1p-50) - r : Double.NEGATIVE_INFINITY;
        distance = r / least * UP;
        logarithms = new Enclosure[n];
        double largest = 0;
        for (int i = 0; i < n; i++) {
            logarithms[i] = Enclosure.exact(s.value(i))
                    .plus(Enclosure.exact(s.valueTail(i)))
                    .ln();
            largest = Math.max(largest, Math.max(Math.abs(logarithms[i].lower()), Math.abs(logarithms[i].upper())));
        }
        norm = largest;
    }

    static LogarithmOfState of(EnclosedSpectrum s, Enclosure trace) {
        return new LogarithmOfState(s, trace);
    }

    /**
     * Encloses the relative entropies of the normalised letters to S/Tr S.
     *
     * @param letters the letters
     * @param p the distribution that ρ belongs to
     * @param away a bound on ‖ρ − S₀‖ for the mixture ρ and some S₀ ≤ S
     * @param weight what holds the factor by which the mixture of normalised letters is below ρ
     */
    CapacityCertificate certificate(List<LetterFactor> letters, double[] p, double away, Enclosure weight) {
        List<Enclosure> divergences = new ArrayList<>();
        for (LetterFactor w : letters) {
            divergences.add(least > 0 ? divergence(w) : Enclosure.of(0, Double.POSITIVE_INFINITY));
        }
        // ρ ≤ S + away·1 ≤ S(1 + away/least)
        Enclosure above = least > 0
                ? Enclosure.ONE.plus(Enclosure.of(0, away / least * UP)).ln()
                : Enclosure.infinite();
        return CapacityCertificate.of(p, divergences, lnTrace.minus(weight.ln()).plus(above));
    }

    private Enclosure divergence(LetterFactor w) {
        EnclosedMatrix y = bra.times(w.columns());
        Enclosure cross = Enclosure.ZERO;
        for (int i = 0; i < y.rows(); i++) {
            Enclosure weight = Enclosure.ZERO;
            for (int c = 0; c < y.columns(); c++) {
                weight = weight.plus(squareOfModulus(y, i, c));
            }
            cross = cross.plus(weight.times(logarithms[i]));
        }
        double trace = (w.trace().upper() + w.error()) * UP;
        double radius = (2 * defect * norm + distance) * trace + w.error() * (norm + distance);
        return w.purity()
                .minus(cross.widen(radius * UP).dividedBy(w.trace()))
                .plus(lnTrace)
                .max(Enclosure.ZERO);
    }

    /** |y|², from the ball of the entry. */
    private static Enclosure squareOfModulus(EnclosedMatrix y, int i, int c) {
        double re = y.re(i, c);
        double im = y.im(i, c);
        Enclosure middle =
                Enclosure.exact(re).times(re).plus(Enclosure.exact(im).times(im));
        // the trailing parts are at most 2^-53 of the leading ones: |y|² moves by 2|y|(r + 2^-53|y|) and the square of
        // that
        double modulus = y.modulusUpper(i, c);
        double away = y.radius(i, c) + 0x1p-53 * (Math.abs(re) + Math.abs(im));
        return middle.widen((2 * modulus + away) * away * (1 + 0x1p-48)).max(Enclosure.ZERO);
    }
}
