/**
 * Tests between two states, measurements on many, and what they cost; read in this order:
 *
 * <ul>
 *   <li>two states: {@link org.minorant.measurement.HypothesisPair} answers the minimum error and the least type-II error, {@link
 *       org.minorant.measurement.TradeOffCurve} both at once, {@link org.minorant.measurement.BinaryTest} is what attains them;
 *   <li>many states: {@link org.minorant.measurement.Ensemble}, measured by any {@link org.minorant.measurement.Povm}, which gives a {@link
 *       org.minorant.measurement.JointDistribution}; {@link org.minorant.measurement.PrettyGoodMeasurement} and {@link
 *       org.minorant.measurement.WeightedSquareRootMeasurement} are made for the ensemble.
 * </ul>
 *
 * <p>Every number is a certified {@link org.minorant.core.Enclosure}; errors are carried as their own sums and are never one minus a success.
 *
 * <p><b>What is not covered.</b> The numbers hold for the states and operators as given. They say nothing about how well a device prepares or measures them, nor
 * about an adversary: a safety or security argument that rests on them needs the review of somebody qualified in that field.
 */
package org.minorant.measurement;
