package org.minorant.study;

import org.minorant.bounds.Side;
import org.minorant.core.Enclosure;

/**
 * One certified number of a report. The printed report and the CSV file are two layouts of the same rows.
 *
 * @param quantity what the number is, such as "minimum error"
 * @param argument what it depends on, such as "type-I error at most 0.01"; empty if nothing more
 * @param side whether the number is the quantity itself or a bound on it from one side
 * @param value an enclosure of the number
 * @param unit its unit
 * @param by how it was come by
 */
record Row(String quantity, String argument, Side side, Enclosure value, Unit unit, Citation by) {}
