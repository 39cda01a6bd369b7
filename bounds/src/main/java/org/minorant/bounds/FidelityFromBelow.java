package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.core.Enclosure;

/**
 * P_e ≥ ½(1 − √(1 − 4p(1−p)F^(2n))). With A = pρ^⊗n, B = (1−p)σ^⊗n, F' = ‖√A√B‖₁ and T = Tr(A + B): ‖A − B‖₁² ≤ T² − 4F'² (Fuchs and van de Graaf for
 * normalised states; their proof, by
 * purifications of A and B and ‖|a⟩⟨a| − |b⟩⟨b|‖₁² = (‖a‖² + ‖b‖²)² − 4|⟨a|b⟩|², holds for any traces), so P_e = ½(T − ‖A − B‖₁) ≥ 2F'²/(T
 * + √(T² − 4F'²)), written so that small
 * values keep their digits. Equality holds for pure states.
 */
final class FidelityFromBelow implements TestingBound {

    private static final Theorem THEOREM = new Theorem(
            "fidelity, from below",
            "C. A. Fuchs, J. van de Graaf, IEEE Trans. Inf. Theory 45, 1216 (1999), theorem 1, for equal priors (from memory)");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        if (!problem.hasTwoStates()) {
            return Optional.empty();
        }
        Enclosure f = FidelityFromAbove.fidelity(problem);
        Enclosure f2 = f.times(f);
        Enclosure first = problem.pair().curve().firstTrace().times(problem.prior());
        Enclosure t = first.plus(problem.pair().curve().secondTrace().times(problem.otherPrior()));
        Enclosure root = t.times(t).minus(f2.times(4)).max(Enclosure.ZERO).sqrt();
        return Optional.of(Bound.of(
                Side.LOWER, f2.times(2).dividedBy(t.plus(root)), THEOREM, List.of(TestingProblem.BOTH_POSSIBLE)));
    }
}
