package org.minorant.study;

import java.awt.BasicStroke;
import java.awt.Color;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.function.ToDoubleFunction;
import org.knowm.xchart.XYChart;
import org.knowm.xchart.XYChartBuilder;
import org.knowm.xchart.XYSeries;
import org.knowm.xchart.style.Styler.LegendPosition;
import org.knowm.xchart.style.markers.Marker;
import org.knowm.xchart.style.markers.SeriesMarkers;
import org.minorant.bounds.Side;
import org.minorant.study.CopiesPlot.Curve;
import org.minorant.study.CopiesPlot.Point;

/** Errors against the number of copies, and their exponents, with the bounds. */
final class CopiesChart {

    private static final int WIDTH = 1150;

    private static final int HEIGHT = 620;

    /** Guessing without measuring does not fall, and s = 1/2 covers the best s. */
    private static final Set<String> LEFT_OUT = Set.of("guess without measuring", "quantum Chernoff bound, s = 1/2");

    /** Exponents beyond this multiple of the common one, those of the first few copies, would press the rest together. */
    private static final double SPREAD = 5;

    private static final List<Color> LOWER = List.of(Charts.BLUE, Charts.SKY);

    private static final List<Color> UPPER = List.of(Charts.VERMILION, Charts.PURPLE);

    private static final BasicStroke BROAD = new BasicStroke(3, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND);

    private CopiesChart() {}

    /** The errors themselves: almost straight lines. */
    static String errors(String study, String pair, CopiesPlot plot) {
        XYChart chart = chart(study, "errors against copies of " + pair, "error probability");
        double log10 = Math.log10(2);
        curves(chart, plot, p -> p.log2() * log10, Double.POSITIVE_INFINITY);
        // drawn as logarithms: the axis arithmetic of the charts ends at 1e-308
        chart.getStyler()
                .setyAxisTickLabelsFormattingFunction(
                        y -> y == 0 ? "1" : String.format(Locale.ROOT, y == Math.rint(y) ? "1e%.0f" : "1e%.1f", y));
        chart.getStyler().setXAxisDecimalPattern("0");
        chart.getStyler().setLegendPosition(LegendPosition.OutsideE);
        return Charts.svg(chart);
    }

    /** What each copy adds: where all curves that are good for many copies meet. */
    static String exponents(String study, String pair, CopiesPlot plot) {
        XYChart chart = chart(study, "exponents against copies of " + pair, "-(1/n) log2 of the error, bits per copy");
        curves(chart, plot, Point::exponent, plot.chernoff() > 0 ? SPREAD * plot.chernoff() : Double.POSITIVE_INFINITY);
        int most = plot.curves().stream()
                .flatMap(c -> c.points().stream())
                .mapToInt(Point::copies)
                .max()
                .orElse(1);
        if (Double.isFinite(plot.chernoff())) {
            Charts.level(chart, "Chernoff divergence", 1, Math.max(2, most), plot.chernoff());
        }
        Charts.againstNumbers(chart);
        return Charts.svg(chart);
    }

    private static XYChart chart(String study, String subject, String yTitle) {
        XYChart chart = new XYChartBuilder()
                .width(WIDTH)
                .height(HEIGHT)
                .title(Charts.title(study, subject))
                .xAxisTitle("number of copies n")
                .yAxisTitle(yTitle)
                .build();
        Charts.style(chart);
        return chart;
    }

    /** In the order of the ledger: lower bounds, the value, upper bounds. Bounds that are known for one copy only are no curves. */
    private static void curves(XYChart chart, CopiesPlot plot, ToDoubleFunction<Point> height, double most) {
        boolean many = plot.curves().stream().anyMatch(c -> c.points().size() > 1);
        int lower = 0;
        int upper = 0;
        for (Curve c : plot.curves()) {
            List<Point> seen = c.points().stream()
                    .filter(p -> height.applyAsDouble(p) <= most)
                    .toList();
            if (LEFT_OUT.contains(c.name())
                    || seen.isEmpty()
                    || many && c.points().size() == 1) {
                continue;
            }
            double[] x = seen.stream().mapToDouble(Point::copies).toArray();
            double[] y = seen.stream().mapToDouble(height).toArray();
            XYSeries series = chart.addSeries(c.side() == Side.EXACT ? "the value itself" : c.name(), x, y);
            Color color = c.name().equals(Citation.FOUND.method())
                    ? Charts.ORANGE
                    : switch (c.side()) {
                        case LOWER -> LOWER.get(lower++ % LOWER.size());
                        case EXACT -> Color.BLACK;
                        case UPPER -> UPPER.get(upper++ % UPPER.size());
                    };
            series.setLineColor(color);
            series.setMarkerColor(color);
            series.setMarker(marker(c));
            series.setLineStyle(color.equals(Color.BLACK) ? BROAD : Charts.LINE);
        }
    }

    private static Marker marker(Curve c) {
        if (c.name().equals(Citation.FOUND.method())) {
            return SeriesMarkers.CIRCLE;
        }
        return switch (c.side()) {
            case LOWER -> SeriesMarkers.TRIANGLE_UP;
            case EXACT -> SeriesMarkers.DIAMOND;
            case UPPER -> SeriesMarkers.TRIANGLE_DOWN;
        };
    }
}
