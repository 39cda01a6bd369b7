package org.minorant.study;

import java.awt.BasicStroke;
import java.util.List;
import org.knowm.xchart.XYChart;
import org.knowm.xchart.XYChartBuilder;
import org.knowm.xchart.XYSeries;
import org.knowm.xchart.style.Styler.LegendPosition;
import org.knowm.xchart.style.XYStyler;
import org.knowm.xchart.style.markers.SeriesMarkers;
import org.minorant.study.StudyFile.PairLine;
import org.minorant.study.TradeOffPlot.Point;

/** The trade-off curve between its two certified sides: a broad line for the upper, a thin dashed one upon it for the lower. */
final class TradeOffChart {

    private static final int WIDTH = 900;

    private static final int HEIGHT = 660;

    private static final BasicStroke BROAD = new BasicStroke(6, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND);

    private static final BasicStroke DASHED =
            new BasicStroke(2, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND, 10, new float[] {8, 5}, 0);

    private TradeOffChart() {}

    static String svg(String study, PairLine line, TradeOffPlot plot) {
        XYChart chart = new XYChartBuilder()
                .width(WIDTH)
                .height(HEIGHT)
                .title(Charts.title(study, "errors of telling " + line.first() + " from " + line.second()))
                .xAxisTitle("type-I error: probability of taking " + line.first() + " for " + line.second())
                .yAxisTitle("type-II error: probability of taking " + line.second() + " for " + line.first())
                .build();
        Charts.style(chart);
        axes(chart.getStyler(), plot);
        series(chart, "least type-II error lies below", plot.upper())
                .setLineColor(Charts.ORANGE)
                .setLineStyle(BROAD);
        series(chart, "least type-II error lies above", plot.lower())
                .setLineColor(Charts.BLUE)
                .setLineStyle(DASHED);
        return Charts.svg(chart);
    }

    private static void axes(XYStyler s, TradeOffPlot plot) {
        s.setXAxisMin(plot.smallest());
        s.setYAxisMin(plot.smallest());
        s.setXAxisMax(1.0);
        s.setYAxisMax(1.0);
        // the frame stays clear of the labels 0 and 1 at the ends
        s.setPlotContentSize(0.97);
        if (plot.logarithmic()) {
            s.setXAxisLogarithmic(true);
            // ten lines a decade would hide the curve
            s.setPlotGridLinesVisible(false);
            s.setYAxisLogarithmic(true);
            s.setLegendPosition(LegendPosition.InsideSW);
        } else {
            s.setXAxisDecimalPattern("0.0");
            s.setYAxisDecimalPattern("0.0");
            s.setXAxisTickMarkSpacingHint(70);
            s.setLegendPosition(LegendPosition.InsideNE);
        }
    }

    private static XYSeries series(XYChart chart, String name, List<Point> points) {
        double[] x = points.stream().mapToDouble(Point::typeOne).toArray();
        double[] y = points.stream().mapToDouble(Point::typeTwo).toArray();
        XYSeries series = chart.addSeries(name, x, y);
        series.setMarker(SeriesMarkers.NONE);
        return series;
    }
}
