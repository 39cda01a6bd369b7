/**
 * The study runner: states from files on disk in, a certified report, its numbers as CSV and its charts out.
 *
 * <p>In reading order: {@link org.minorant.study.Study} is the command; {@link org.minorant.study.StudyFile} is what a study file says and
 * {@link org.minorant.study.StudyParser} reads it; {@link org.minorant.study.States} reads the states it names; {@link
 * org.minorant.study.PairSection}, {@link org.minorant.study.EnsembleSection} and {@link org.minorant.study.ChannelSection} compute, each into
 * a {@link org.minorant.study.Section} of {@link org.minorant.study.Row rows}; {@link org.minorant.study.ReportText}, {@link
 * org.minorant.study.CsvText} and the charts only lay out what the rows hold.
 */
package org.minorant.study;
