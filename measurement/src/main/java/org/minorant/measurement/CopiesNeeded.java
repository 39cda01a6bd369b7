package org.minorant.measurement;

import org.minorant.core.Enclosure;

/**
 * The least number of copies at which two states can be told apart with a given error.
 *
 * @param value n: the minimum error at n copies is certainly at most the target
 * @param errorAt the minimum error at n copies
 * @param errorBefore the minimum error at n − 1 copies (guessing by the priors for n = 1)
 * @param target the error asked for
 */
public record CopiesNeeded(int value, Enclosure errorAt, Enclosure errorBefore, double target) {

    /**
     * Tells whether one copy less is certainly too few. It is, unless the error there equals the target within rounding.
     *
     * @return whether n is certainly the least number
     */
    public boolean isLeast() {
        return errorBefore.lower() > target;
    }
}
