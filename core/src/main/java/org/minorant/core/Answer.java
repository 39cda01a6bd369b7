package org.minorant.core;

/** The answer to a question about numbers that are known as enclosures. */
public enum Answer {
    /** Yes, whatever the numbers are within their enclosures. */
    CERTAINLY,
    /** No, whatever the numbers are within their enclosures. */
    CERTAINLY_NOT,
    /** The enclosures allow both. */
    UNDECIDED
}
