package org.minorant.bounds;

import java.util.ArrayList;
import java.util.List;
import org.minorant.bounds.divergence.Ball;
import org.minorant.bounds.divergence.StatePair;
import org.minorant.core.Enclosure;
import org.minorant.core.pair.EnclosedSpectra;

/**
 * The two Nussbaum–Szkoła distributions P_ij = |⟨u_i|v_j⟩|² a_i and Q_ij = |⟨u_i|v_j⟩|² b_j of A = Σ a_i |u_i⟩⟨u_i| and B = Σ b_j |v_j⟩⟨v_j|, over pairs of eigenvectors. Those of n copies are the n-fold
 * products, so that sums over them are sums over types of pairs.
 *
 * <p><b>Rounding.</b> Operators with the lower ends of the eigenvalues and the same vectors lie below A and B, and smaller overlaps only lower a sum of minima; so what the lower ends of the letters give is
 * itself a lower bound.
 *
 * <p>Source: M. Nussbaum, A. Szkoła, Ann. Statist. 37, 1040 (2009), equation 4 (from memory).
 */
final class PairLetters {

    private PairLetters() {}

    static EnclosedSpectra of(StatePair pair) {
        List<Enclosure> first = new ArrayList<>();
        List<Enclosure> second = new ArrayList<>();
        for (int i = 0; i < pair.first().rank(); i++) {
            for (int j = 0; j < pair.second().rank(); j++) {
                first.add(product(pair.square(i, j), pair.first().values().get(i)));
                second.add(product(pair.square(i, j), pair.second().values().get(j)));
            }
        }
        return first.isEmpty()
                ? EnclosedSpectra.of(List.of(Enclosure.ZERO), List.of(Enclosure.ZERO))
                : EnclosedSpectra.of(first, second);
    }

    private static Enclosure product(Ball overlap, Ball value) {
        return overlap.times(value).toEnclosure().clip(0, Double.POSITIVE_INFINITY);
    }
}
