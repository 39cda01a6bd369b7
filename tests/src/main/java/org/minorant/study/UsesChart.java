package org.minorant.study;

import java.awt.Color;
import java.util.List;
import org.knowm.xchart.XYChart;
import org.knowm.xchart.XYChartBuilder;
import org.knowm.xchart.XYSeries;
import org.knowm.xchart.style.markers.SeriesMarkers;
import org.minorant.bounds.Side;
import org.minorant.study.UsesPlot.Curve;
import org.minorant.study.UsesPlot.Point;

/** Bits for each use against the number of uses, with the capacity that they approach. */
final class UsesChart {

    private static final int WIDTH = 1150;

    private static final int HEIGHT = 620;

    /** Bounds beyond this multiple of the capacity, those of a few uses, would press the rest together. */
    private static final double SPREAD = 2;

    private static final List<Color> LOWER = List.of(Charts.BLUE, Charts.SKY);

    private static final List<Color> UPPER = List.of(Charts.VERMILION, Charts.PURPLE);

    private UsesChart() {}

    static String svg(String study, String channel, UsesPlot plot) {
        XYChart chart = new XYChartBuilder()
                .width(WIDTH)
                .height(HEIGHT)
                .title(Charts.title(study, "what uses of " + channel + " carry"))
                .xAxisTitle("number of uses n")
                .yAxisTitle("bits for each use")
                .build();
        Charts.style(chart);
        double most = SPREAD * plot.capacity();
        int lower = 0;
        int upper = 0;
        for (Curve c : plot.curves()) {
            boolean achieved = c.side() == Side.LOWER;
            int number = achieved ? lower++ : upper++;
            List<Color> colors = achieved ? LOWER : UPPER;
            XYSeries series = add(chart, c.name(), c.points(), most, colors.get(number % colors.size()));
            series.setMarker(achieved ? SeriesMarkers.TRIANGLE_UP : SeriesMarkers.TRIANGLE_DOWN);
            series.setLineStyle(number < colors.size() ? Charts.LINE : Charts.DASHED);
        }
        XYSeries normal = add(chart, "normal approximation (no bound)", plot.normal(), most, Charts.ORANGE);
        normal.setMarker(SeriesMarkers.CIRCLE);
        normal.setLineStyle(Charts.LINE);
        int last = plot.normal().stream().mapToInt(Point::uses).max().orElse(1);
        int first = plot.normal().stream().mapToInt(Point::uses).min().orElse(1);
        Charts.level(chart, "capacity", first, Math.max(first + 1, last), plot.capacity());
        Charts.againstNumbers(chart);
        return Charts.svg(chart);
    }

    /** A curve of what lies between 0 and the most that is shown; one that lies outside entirely ends on the edge. */
    private static XYSeries add(XYChart chart, String name, List<Point> points, double most, Color color) {
        List<Point> seen =
                points.stream().filter(p -> p.rate() >= 0 && p.rate() <= most).toList();
        List<Point> drawn = seen.isEmpty() ? points.subList(points.size() - 1, points.size()) : seen;
        XYSeries series = chart.addSeries(
                name,
                drawn.stream().mapToDouble(Point::uses).toArray(),
                drawn.stream()
                        .mapToDouble(p -> Math.max(0, Math.min(most, p.rate())))
                        .toArray());
        series.setLineColor(color);
        series.setMarkerColor(color);
        return series;
    }
}
