package org.minorant.bounds;

import java.util.List;
import java.util.Optional;
import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.SpectralState;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.core.Enclosure;
import org.minorant.core.InvalidInputException;

/**
 * P_e ≥ ½ Σ_ij |⟨u_i|v_j⟩|² min(p a_i, (1−p) b_j) with a_i, u_i and b_j, v_j eigenvalues and eigenvectors of ρ and σ.
 *
 * <p><b>Accuracy.</b> The sum is that of the certified spectral decompositions at the lower ends of their eigenvalues. These operators lie
 * below pρ and
 * (1−p)σ, so that the theorem for them and monotonicity of Tr[A ∧ B] give the bound for the states themselves.
 *
 * <p><b>n copies.</b> Their distributions are products, summed exactly over types of pairs (i, j), see {@link PairLetters}. Where more types matter than can be summed, the bound is left out.
 */
final class HalfNussbaumSzkola implements TestingBound {

    private static final Theorem THEOREM = new Theorem(
            "half the Nussbaum-Szkola error",
            "M. Nussbaum, A. Szkoła, Ann. Statist. 37, 1040 (2009), proposition 2 and its proof (from memory)");

    @Override
    public Optional<Bound> on(TestingProblem problem) {
        if (!problem.hasTwoStates()) {
            return Optional.empty();
        }
        return value(problem).map(v -> Bound.of(Side.LOWER, v, THEOREM, List.of(TestingProblem.BOTH_POSSIBLE)));
    }

    private static Optional<Enclosure> value(TestingProblem problem) {
        if (problem.copies() == 1) {
            return Optional.of(oneCopy(problem));
        }
        try {
            return Optional.of(PairLetters.of(problem.spectra())
                    .traceMinimum(problem.copies(), Enclosure.exact(problem.prior()), problem.otherPrior())
                    .times(0.5));
        } catch (InvalidInputException tooManyTypes) {
            return Optional.empty();
        }
    }

    private static Enclosure oneCopy(TestingProblem problem) {
        StatePair pair = problem.spectra();
        SpectralState a = pair.first();
        SpectralState b = pair.second();
        Ball p = Ball.of(problem.prior());
        Ball q = Ball.difference(1, problem.prior());
        Ball sum = Ball.ZERO;
        for (int i = 0; i < a.rank(); i++) {
            for (int j = 0; j < b.rank(); j++) {
                Ball least = a.values().get(i).times(p).min(b.values().get(j).times(q));
                sum = sum.plus(pair.square(i, j).times(least));
            }
        }
        return sum.times(0.5).toEnclosure().clip(0, Double.POSITIVE_INFINITY);
    }
}
