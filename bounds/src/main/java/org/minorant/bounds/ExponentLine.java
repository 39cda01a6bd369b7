package org.minorant.bounds;

import org.minorant.core.Enclosure;

/**
 * A line in s.
 *
 * @param value at the point's s; its upper end counts
 * @param slope its slope
 */
record ExponentLine(Enclosure value, Enclosure slope) {}
