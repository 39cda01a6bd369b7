package org.minorant.core.pair;

import java.util.Optional;
import org.minorant.core.Enclosure;
import org.minorant.core.WideDouble;

/**
 * Encloses f = a − λ for the root λ of Σ w_i/(λ + t b_i) = 1, a = Σ w_i: by {@link FixedPointForm} where f ≤ a/2, so that a tiny f keeps its digits, by {@link EigenvalueForm}
 * elsewhere, so that they are kept next to f = a as well.
 */
final class SecularRoot {

    private SecularRoot() {}

    /** The value for the weight t on B, known to a relative error. */
    static Enclosure enclose(SpectralPoints given, WideDouble t, double relativeError) {
        SpectralPoints points = given.withValueError(given.valueError() + relativeError);
        if (points.total().upperWide().signum() == 0 || points.weights().size() == 0) {
            return Enclosure.ZERO;
        }
        Optional<Enclosure> small = new FixedPointForm(points, t, WideDouble.ZERO, Effort.DEFAULT).solve();
        return small.orElseGet(() -> new EigenvalueForm(points, t, Effort.DEFAULT).solve());
    }
}
