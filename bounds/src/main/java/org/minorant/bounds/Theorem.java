package org.minorant.bounds;

/**
 * Where a bound comes from.
 *
 * @param name the usual name, such as "quantum Chernoff bound"
 * @param source authors, paper, year and equation or theorem number; "(from memory)" where the number was not read again
 */
public record Theorem(String name, String source) {

    /**
     * Validates the texts.
     *
     * @param name the usual name of the theorem
     * @param source where it is published
     * @throws org.minorant.core.InvalidInputException if one is blank
     */
    public Theorem {
        Checks.text("Theorem", "the name", name);
        Checks.text("Theorem", "the source", source);
    }

    @Override
    public String toString() {
        return name + " [" + source + "]";
    }
}
