package org.minorant.measurement;

/**
 * A measurement that was made of operators that did not form one, with what that took.
 *
 * @param povm the measurement
 * @param hermitianDefect the largest ‖A − A*‖/2 of the given operators, in Hilbert–Schmidt norm
 * @param negativePart the largest Tr A₋ of their Hermitian parts
 * @param completenessDefect ‖ΣA − 1‖ in Hilbert–Schmidt norm, of the positive parts of their Hermitian parts
 * @param distance √Σ‖M_j − A_j‖², the Hilbert–Schmidt distance of the result from what was given
 */
public record RepairedPovm(
        Povm povm, double hermitianDefect, double negativePart, double completenessDefect, double distance) {}
