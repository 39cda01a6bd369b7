package org.minorant.study;

import java.awt.Color;
import java.util.ArrayList;
import java.util.EnumSet;
import java.util.List;
import java.util.Set;
import org.knowm.xchart.XYChart;
import org.knowm.xchart.XYChartBuilder;
import org.knowm.xchart.XYSeries;
import org.knowm.xchart.style.AxesChartStyler.TextAlignment;
import org.knowm.xchart.style.Styler.LegendLayout;
import org.knowm.xchart.style.Styler.LegendPosition;
import org.knowm.xchart.style.XYStyler;
import org.knowm.xchart.style.lines.SeriesLines;
import org.knowm.xchart.style.markers.Marker;
import org.knowm.xchart.style.markers.SeriesMarkers;
import org.minorant.bounds.Side;

/**
 * Bounds above each other on a logarithmic axis, each a marker for its side and a line as long as its enclosure, which is mostly too short to be
 * seen. A bound of 0 or of infinity has no place on such an axis; its label says so instead.
 */
final class BoundsChart {

    private static final int WIDTH = 1250;

    private static final int ROW = 34;

    private static final int FRAME = 170;

    private static final int LONGEST_LABEL = 60;

    /** Smaller numbers are drawn at this place; the axis arithmetic of the charts is in double precision. */
    private static final double SMALLEST = 1e-300;

    private final List<Bar> bars;
    private final double axisMin;
    private final double axisMax;

    private BoundsChart(List<Bar> bars) {
        this.bars = bars;
        double min = Double.MAX_VALUE;
        double max = SMALLEST;
        for (Bar b : bars) {
            if (b.isDrawable()) {
                min = Math.min(min, b.lower() > 0 ? b.lower() : b.upper());
                max = Math.max(max, b.upper());
            }
        }
        this.axisMin = decade(Math.min(Math.max(min, SMALLEST), max), Math::floor);
        this.axisMax = Math.max(decade(max, Math::ceil), 10 * axisMin);
    }

    private static double decade(double x, java.util.function.DoubleUnaryOperator rounding) {
        return Math.pow(10, rounding.applyAsDouble(Math.log10(x)));
    }

    /** Draws the bars from the bottom up. */
    static String svg(String title, String axisTitle, List<Bar> bars) {
        return Charts.svg(new BoundsChart(bars).chart(title, axisTitle));
    }

    private XYChart chart(String title, String axisTitle) {
        XYChart chart = new XYChartBuilder()
                .width(WIDTH)
                .height(FRAME + ROW * (bars.size() + 1))
                .title(title)
                .xAxisTitle(axisTitle)
                .build();
        Charts.style(chart);
        XYStyler s = chart.getStyler();
        s.setXAxisLogarithmic(true);
        s.setXAxisMin(axisMin);
        s.setXAxisMax(axisMax);
        s.setYAxisMin(0.0);
        s.setYAxisMax(bars.size() + 1.0);
        s.setYAxisTickMarkSpacingHint(ROW);
        s.setYAxisLabelAlignment(TextAlignment.Right);
        List<String> labels = labels();
        // ticks are put where there are data, which are the whole numbers from 0 to one past the last bar
        s.setyAxisTickLabelsFormattingFunction(y -> labels.get((int) Math.round(y)));
        s.setLegendPosition(LegendPosition.OutsideS);
        s.setLegendLayout(LegendLayout.Horizontal);
        Set<Side> explained = EnumSet.noneOf(Side.class);
        for (int i = 0; i < bars.size(); i++) {
            boolean first =
                    bars.get(i).isDrawable() && explained.add(bars.get(i).side());
            add(chart, i + 1, bars.get(i)).setShowInLegend(first);
        }
        return chart;
    }

    private XYSeries add(XYChart chart, int y, Bar b) {
        double low = Math.min(Math.max(b.lower(), axisMin), axisMax);
        double high = b.isDrawable() ? Math.max(b.upper(), axisMin) : low;
        // names must differ; only the first of each side is shown
        XYSeries series =
                chart.addSeries(legend(b.side()) + " ".repeat(y), new double[] {low, high}, new double[] {y, y});
        Color color = color(b.side());
        series.setMarker(b.isDrawable() ? marker(b.side()) : SeriesMarkers.NONE);
        series.setMarkerColor(color);
        series.setLineColor(color);
        if (!b.isDrawable()) {
            series.setLineStyle(SeriesLines.NONE);
        }
        return series;
    }

    /** One label for each tick; the axis drops labels that are equal, so the two ends have blanks of different length. */
    private List<String> labels() {
        List<String> labels = new ArrayList<>(List.of(" "));
        for (Bar b : bars) {
            String place = b.isDrawable() ? "" : b.upper() > 0 ? " (infinite)" : " (zero)";
            int room = LONGEST_LABEL - place.length();
            String label = (b.label().length() <= room ? b.label() : b.label().substring(0, room - 3) + "...") + place;
            while (labels.contains(label)) {
                label += " ";
            }
            labels.add(label);
        }
        labels.add("  ");
        return labels;
    }

    private static String legend(Side side) {
        return switch (side) {
            case LOWER -> "lower bound";
            case EXACT -> "the value itself";
            case UPPER -> "upper bound";
        };
    }

    private static Color color(Side side) {
        return switch (side) {
            case LOWER -> Charts.BLUE;
            case EXACT -> Color.BLACK;
            case UPPER -> Charts.VERMILION;
        };
    }

    private static Marker marker(Side side) {
        return switch (side) {
            case LOWER -> SeriesMarkers.TRIANGLE_UP;
            case EXACT -> SeriesMarkers.DIAMOND;
            case UPPER -> SeriesMarkers.TRIANGLE_DOWN;
        };
    }
}
