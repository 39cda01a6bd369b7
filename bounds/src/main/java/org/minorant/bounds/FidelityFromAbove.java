package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.bounds.divergence.Fidelity;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.core.Enclosure;

/**
 * P_e ≤ √(p(1−p)) F^n: Tr[A ∧ B] ≤ Tr √A√B ≤ ‖√A√B‖₁ with A = pρ^⊗n, B = (1−p)σ^⊗n; the first step is the Chernoff bound at ½, the second |Tr X| ≤
 * ‖X‖₁. The relative error of F enters n times.
 */
final class FidelityFromAbove implements TestingBound {

    private static final Theorem THEOREM = new Theorem(
            "fidelity, from above",
            "C. A. Fuchs, J. van de Graaf, IEEE Trans. Inf. Theory 45, 1216 (1999), theorem 1, for equal priors (from memory)");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        return problem.hasTwoStates()
                ? Optional.of(Bound.of(Side.UPPER, fidelity(problem), THEOREM, List.of(TestingProblem.BOTH_POSSIBLE)))
                : Optional.empty();
    }

    /** ‖√A√B‖₁ for the operators as given. */
    static Enclosure fidelity(TestingProblem problem) {
        StatePair s = problem.spectra();
        int n = problem.copies();
        Enclosure a = s.first().trace().toEnclosure().power(n).times(problem.prior());
        Enclosure b = s.second().trace().toEnclosure().power(n).times(problem.otherPrior());
        return a.times(b).sqrt().times(Fidelity.value(s).power(n));
    }
}
