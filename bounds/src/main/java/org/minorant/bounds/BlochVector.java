package org.minorant.bounds;

import org.minorant.core.EnclosedMatrix;
import org.minorant.core.Enclosure;

/**
 * The trace and the unnormalised Bloch vector of a qubit operator W = ½(t + v·σ), enclosed.
 *
 * @param trace t
 * @param x first component of v
 * @param y second component
 * @param z third component
 */
record BlochVector(Enclosure trace, Enclosure x, Enclosure y, Enclosure z) {

    static BlochVector of(LetterFactor w) {
        EnclosedMatrix s = w.columns().times(w.columns().adjoint());
        Enclosure up = s.enclosureRe(0, 0);
        Enclosure down = s.enclosureRe(1, 1);
        // ‖½(t + v·σ)‖₁ = max(|t|, |v|)
        return new BlochVector(
                w.trace(),
                s.enclosureRe(1, 0).times(2).widen(w.error()),
                s.enclosureIm(1, 0).times(2).widen(w.error()),
                up.minus(down).widen(w.error()));
    }

    Enclosure length() {
        return root(x.square().plus(y.square()).plus(z.square()));
    }

    Enclosure dot(BlochVector b) {
        return x.times(b.x).plus(y.times(b.y)).plus(z.times(b.z));
    }

    /** |v × b|. */
    Enclosure cross(BlochVector b) {
        Enclosure i = y.times(b.z).minus(z.times(b.y)).square();
        Enclosure j = z.times(b.x).minus(x.times(b.z)).square();
        Enclosure k = x.times(b.y).minus(y.times(b.x)).square();
        return root(i.plus(j).plus(k));
    }

    /** The smaller eigenvalue. */
    Enclosure least() {
        return trace.minus(length()).times(0.5);
    }

    private static Enclosure root(Enclosure square) {
        return square.max(Enclosure.ZERO).sqrt();
    }
}
