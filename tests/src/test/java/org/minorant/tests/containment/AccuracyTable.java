package org.minorant.tests.containment;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.math.BigDecimal;
import java.math.MathContext;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import org.minorant.core.Enclosure;
import org.minorant.tests.reference.Reference;

/** How wide the enclosures of one family are and how far their midpoints lie from the truth, against committed limits. */
final class AccuracyTable {

    private static final String LIMITS = "accuracy-limits.csv";
    private static final MathContext FEW = new MathContext(12);

    private final List<Double> relativeWidths = new ArrayList<>();
    private final List<Double> relativeErrors = new ArrayList<>();
    private final List<Double> absoluteWidths = new ArrayList<>();
    private final List<Double> absoluteErrors = new ArrayList<>();

    /** Adds one answer; relative numbers are kept where the true value is not zero, absolute ones in units of min(a Tr A, b Tr B). */
    void add(PairCase pair, Enclosure answer, Reference reference) {
        BigDecimal width = Double.isInfinite(answer.width())
                ? BigDecimal.valueOf(Double.MAX_VALUE)
                : answer.upperWide().toBigDecimal().subtract(answer.lowerWide().toBigDecimal());
        BigDecimal error = answer.lowerWide()
                .toBigDecimal()
                .add(width.divide(BigDecimal.valueOf(2)))
                .subtract(reference.value())
                .abs();
        if (reference.isSharp() && reference.value().signum() > 0) {
            relativeWidths.add(width.divide(reference.value(), FEW).doubleValue());
            relativeErrors.add(error.divide(reference.value(), FEW).doubleValue());
        }
        BigDecimal scale = pair.scale();
        if (scale.signum() > 0) {
            absoluteWidths.add(width.divide(scale, FEW).doubleValue());
            absoluteErrors.add(error.divide(scale, FEW).doubleValue());
        }
    }

    double medianRelativeWidth() {
        double[] sorted = relativeWidths.stream()
                .mapToDouble(Double::doubleValue)
                .sorted()
                .toArray();
        return sorted.length == 0 ? 0 : sorted[sorted.length / 2];
    }

    double largestRelativeWidth() {
        return largest(relativeWidths);
    }

    private static double largest(List<Double> values) {
        return values.stream().mapToDouble(Double::doubleValue).max().orElse(0);
    }

    private static double rms(List<Double> values) {
        double most = largest(values);
        double s = 0;
        for (double v : values) {
            s += most == 0 ? 0 : v / most * (v / most);
        }
        return values.isEmpty() ? 0 : most * Math.sqrt(s / values.size());
    }

    /** Largest and rms of: relative width, relative error, absolute width, absolute error. */
    double[] summary() {
        return new double[] {
            largest(relativeWidths), rms(relativeWidths),
            largest(relativeErrors), rms(relativeErrors),
            largest(absoluteWidths), rms(absoluteWidths),
            largest(absoluteErrors), rms(absoluteErrors)
        };
    }

    /** The line for the file of limits, each half as large again as what was measured. */
    String line(PairFamily family) {
        StringBuilder b = new StringBuilder(family.name());
        for (double v : summary()) {
            b.append(String.format(Locale.ROOT, ",%.1e", 1.5 * v));
        }
        return b.toString();
    }

    /** The committed limits of a family, in the order of {@link #summary}. */
    static double[] limits(PairFamily family) {
        for (String line : lines()) {
            if (line.startsWith(family.name() + ",")) {
                return Arrays.stream(line.split(","))
                        .skip(1)
                        .mapToDouble(Double::parseDouble)
                        .toArray();
            }
        }
        throw new IllegalStateException(family + " has no line in " + LIMITS);
    }

    private static List<String> lines() {
        try (InputStream in = AccuracyTable.class.getResourceAsStream(LIMITS)) {
            return new BufferedReader(new InputStreamReader(in, StandardCharsets.UTF_8))
                    .lines()
                    .toList();
        } catch (IOException e) {
            throw new java.io.UncheckedIOException(e);
        }
    }
}
