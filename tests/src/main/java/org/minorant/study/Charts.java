package org.minorant.study;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Font;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.function.Supplier;
import java.util.regex.Matcher;
import org.knowm.xchart.VectorGraphicsEncoder;
import org.knowm.xchart.VectorGraphicsEncoder.VectorGraphicsFormat;
import org.knowm.xchart.XYChart;
import org.knowm.xchart.XYSeries;
import org.knowm.xchart.style.Styler.LegendPosition;
import org.knowm.xchart.style.XYStyler;
import org.knowm.xchart.style.markers.SeriesMarkers;

/** What all charts share: plain looks, colours that stay apart for every kind of colour vision, and the way to SVG. */
final class Charts {

    /** Blue of M. Okabe and K. Ito's palette (Color Universal Design, 2008, from memory). */
    static final Color BLUE = new Color(0x0072B2);

    /** Vermilion of the same palette. */
    static final Color VERMILION = new Color(0xD55E00);

    /** Orange of the same palette. */
    static final Color ORANGE = new Color(0xE69F00);

    /** Sky blue of the same palette. */
    static final Color SKY = new Color(0x56B4E9);

    /** Reddish purple of the same palette. */
    static final Color PURPLE = new Color(0xCC79A7);

    static final BasicStroke LINE = new BasicStroke(1.6f, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND);

    static final BasicStroke DASHED =
            new BasicStroke(1.6f, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND, 10, new float[] {8, 5}, 0);

    private static final Color GRID = new Color(0xDDDDDD);

    private static final int LONGEST_TITLE = 84;

    private Charts() {}

    /** A title that fits over a chart. */
    static String title(String study, String subject) {
        int room = Math.max(10, LONGEST_TITLE - subject.length());
        String head = study.length() <= room ? study : study.substring(0, room - 3) + "...";
        return head + ": " + subject;
    }

    static void style(XYChart chart) {
        XYStyler s = chart.getStyler();
        s.setChartBackgroundColor(Color.WHITE);
        s.setPlotBackgroundColor(Color.WHITE);
        s.setPlotBorderColor(Color.GRAY);
        s.setPlotGridLinesColor(GRID);
        // a dashed grid would be written dash by dash
        s.setPlotGridLinesStroke(new BasicStroke(1));
        s.setChartTitleFont(new Font(Font.SANS_SERIF, Font.BOLD, 15));
        s.setAxisTitleFont(new Font(Font.SANS_SERIF, Font.PLAIN, 14));
        s.setAxisTickLabelsFont(new Font(Font.SANS_SERIF, Font.PLAIN, 12));
        s.setLegendFont(new Font(Font.SANS_SERIF, Font.PLAIN, 13));
        s.setLegendBorderColor(Color.GRAY);
        s.setLegendSeriesLineLength(40);
        s.setLegendPadding(14);
        s.setMarkerSize(11);
    }

    /** A dashed line at one height, for what curves approach. */
    static void level(XYChart chart, String name, double from, double to, double height) {
        XYSeries line = chart.addSeries(name, new double[] {from, to}, new double[] {height, height});
        line.setMarker(SeriesMarkers.NONE);
        line.setLineColor(Color.GRAY);
        line.setLineStyle(DASHED);
    }

    /** Whole numbers on a logarithmic axis, heights from 0 on, the legend beside the chart. */
    static void againstNumbers(XYChart chart) {
        XYStyler s = chart.getStyler();
        s.setXAxisLogarithmic(true);
        s.setXAxisDecimalPattern("0");
        s.setYAxisMin(0.0);
        s.setYAxisDecimalPattern("0.00");
        s.setPlotGridVerticalLinesVisible(false);
        s.setLegendPosition(LegendPosition.OutsideE);
    }

    /** The chart as SVG. Letters are drawn as outlines, so it looks the same everywhere; the title is there as text for screen readers. */
    static String svg(XYChart chart) {
        ByteArrayOutputStream bytes = new ByteArrayOutputStream();
        try {
            VectorGraphicsEncoder.saveVectorGraphic(chart, bytes, VectorGraphicsFormat.SVG);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        String title = chart.getTitle().replace("&", "&amp;").replace("<", "&lt;");
        // the document type names a page on the network, which some readers fetch
        return bytes.toString(StandardCharsets.UTF_8)
                .replaceFirst("<!DOCTYPE[^>]*>\\s*", "")
                .replaceFirst("(<svg [^>]*>)", "$1\n  <title>" + Matcher.quoteReplacement(title) + "</title>");
    }

    /** Draws, and says what is missing where a Java has no fonts to draw with, as some machines without a screen do. */
    static String draw(StudyFile file, Supplier<String> svg) {
        try {
            return svg.get();
        } catch (InternalError | LinkageError e) {
            throw BadInputException.in(
                    file.path(),
                    "the report and its numbers are written, but this Java cannot draw letters (" + e.getMessage()
                            + "); install fontconfig and a font for the charts");
        }
    }
}
