package org.minorant.study;

import java.util.List;
import org.minorant.bounds.Bound;

/**
 * How a number was come by and where that is published.
 *
 * @param method the method or theorem
 * @param source the publication, "(from memory)" where it was not read again
 * @param checked the hypotheses that were checked before the theorem was applied, empty if it has none
 */
record Citation(String method, String source, List<String> checked) {

    static final Citation HELSTROM = of(
            "Holevo-Helstrom",
            "A. S. Holevo, J. Multivariate Anal. 3, 337 (1973); C. W. Helstrom, Quantum Detection and Estimation Theory (1976), ch. IV"
                    + " (from memory)");

    static final Citation HELSTROM_TEST = of("Helstrom test as stored", HELSTROM.source());

    static final Citation NEYMAN_PEARSON = of(
            "quantum Neyman-Pearson duality",
            "K. M. R. Audenaert, M. Mosonyi, F. Verstraete, J. Math. Phys. 53, 122205 (2012) (from memory)");

    static final Citation PRETTY_GOOD =
            of("pretty-good measurement", "P. Hausladen, W. K. Wootters, J. Mod. Opt. 41, 2385 (1994) (from memory)");

    static final Citation BARNUM_KNILL =
            of("Barnum-Knill bound", "H. Barnum, E. Knill, J. Math. Phys. 43, 2097 (2002) (from memory)");

    static final Citation CAPACITY = of(
            "capacity as a minimax divergence",
            "A. S. Holevo, IEEE Trans. Inf. Theory 44, 269 (1998); B. Schumacher, M. D. Westmoreland, Phys. Rev. A 56, 131 (1997); M. Ohya,"
                    + " D. Petz, N. Watanabe, Probab. Math. Stat. 17, 179 (1997) (all from memory)");

    static final Citation CHOICE = of("input found with the capacity", "this run; a choice, not a bound");

    static final Citation FOUND = of(
            "best projective measurement found, repeated",
            "this run; the error of a measurement that was found, at least the minimum error");

    Citation {
        checked = List.copyOf(checked);
    }

    static Citation of(String method, String source) {
        return new Citation(method, source, List.of());
    }

    /** The theorem behind a bound. */
    static Citation of(Bound bound) {
        return new Citation(bound.theorem().name(), bound.theorem().source(), bound.hypotheses());
    }
}
