package org.minorant.study;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.List;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.minorant.bounds.Side;
import org.minorant.core.DensityOperator;
import org.minorant.measurement.HypothesisPair;
import org.minorant.study.StudyFile.PairLine;
import org.minorant.study.TradeOffPlot.Point;

class ChartsTest {

    private static final String BLUE = "0,114,178";

    private static final String VERMILION = "213,94,0";

    private static final String ORANGE = "230,159,0";

    private static final PairLine LINE = new PairLine(1, "p", "a", "b", 0.5);

    private static TradeOffPlot plot(double overlap) {
        double angle = Math.acos(overlap);
        return TradeOffPlot.of(HypothesisPair.of(
                DensityOperator.ofBloch(0, 0, 1),
                DensityOperator.nearest(DensityOperator.ofBloch(
                                Math.nextDown(Math.sin(2 * angle)), 0, Math.nextUp(Math.cos(2 * angle))))
                        .operator()));
    }

    /** For two pure states of overlap c: the root of beta is c sqrt(1-a) - sqrt((1-c^2) a), as the two kets span an angle. */
    private static double pure(double c, double a) {
        double root = c * Math.sqrt(1 - a) - Math.sqrt((1 - c * c) * a);
        return root <= 0 ? 0 : root * root;
    }

    @Test
    void bothSidesOfALargeErrorAreOnLinearAxesAndEncloseTheCurve() {
        TradeOffPlot plot = plot(0.6);
        assertEquals(false, plot.logarithmic());
        for (Point p : plot.upper()) {
            assertTrue(p.typeTwo() >= pure(0.6, p.typeOne()) - 1e-12, p.toString());
        }
        for (Point p : plot.lower()) {
            assertTrue(p.typeTwo() <= pure(0.6, p.typeOne()) + 1e-12, p.toString());
        }
        assertTrue(plot.upper().size() > 10 && plot.lower().size() > 10);
        assertEquals(0, plot.upper().get(0).typeOne());
        assertEquals(1, plot.upper().get(plot.upper().size() - 1).typeOne());
    }

    @Test
    void aSmallErrorIsOnLogarithmicAxes() {
        double c = 1e-3;
        TradeOffPlot plot = plot(c);
        assertEquals(true, plot.logarithmic());
        // the least error is near c^2/4, both errors of a balanced test near it
        assertEquals(1e-14, plot.smallest(), 1e-28);
        for (int i = 0; i < plot.upper().size(); i++) {
            Point up = plot.upper().get(i);
            double beta = Math.max(pure(c, up.typeOne()), plot.smallest());
            assertTrue(up.typeTwo() >= beta * (1 - 1e-9), up.toString());
            assertTrue(plot.lower().get(i).typeTwo() <= beta * (1 + 1e-9), up.toString());
        }
    }

    @ParameterizedTest
    @ValueSource(doubles = {0.9, 1e-3})
    void theTradeOffChartHasBothCurves(double overlap) throws Exception {
        Svg svg = Svg.parse(TradeOffChart.svg("A & B <study>", LINE, plot(overlap)));
        assertEquals("A & B <study>: errors of telling a from b", svg.title());
        // the curve and its sample in the legend
        assertTrue(svg.shapes(ORANGE) >= 2);
        assertTrue(svg.shapes(BLUE) >= 2);
    }

    @Test
    void statesThatCannotBeConfusedStillGiveAChart() throws Exception {
        TradeOffPlot plot = TradeOffPlot.of(
                HypothesisPair.of(DensityOperator.ofEigenvalues(1, 0), DensityOperator.ofEigenvalues(0, 1)));
        Svg.parse(TradeOffChart.svg("t", LINE, plot));
    }

    @Test
    void boundsAreDrawnInTheColourOfTheirSide() throws Exception {
        List<Bar> bars = List.of(
                new Bar("low", Side.LOWER, 0.01, 0.01),
                new Bar("wide", Side.LOWER, 0.02, 0.03),
                new Bar("exact", Side.EXACT, 0.05, 0.05),
                new Bar("high", Side.UPPER, 0.1, 0.1));
        Svg svg = Svg.parse(BoundsChart.svg("t", "x", bars));
        assertEquals("t", svg.title());
        int low = svg.shapes(BLUE);
        int high = svg.shapes(VERMILION);
        assertTrue(low > high && high > 0, low + " " + high);
        Svg without = Svg.parse(BoundsChart.svg("t", "x", bars.subList(0, 3)));
        assertEquals(0, without.shapes(VERMILION));
        assertEquals(low, without.shapes(BLUE));
    }

    @Test
    void boundsThatHaveNoPlaceOnALogarithmicAxisAreNotDrawn() throws Exception {
        Svg svg = Svg.parse(BoundsChart.svg(
                "t",
                "x",
                List.of(
                        new Bar("zero", Side.LOWER, 0, 0),
                        new Bar("exact", Side.EXACT, 0.2, 0.2),
                        new Bar("infinite", Side.UPPER, 3, Double.POSITIVE_INFINITY))));
        assertEquals(0, svg.shapes(BLUE));
        assertEquals(0, svg.shapes(VERMILION));
    }

    @Test
    void noBoundWithAPlaceStillGivesAChart() throws Exception {
        Svg.parse(BoundsChart.svg("t", "x", List.of(new Bar("zero", Side.EXACT, 0, 0))));
    }

    @Test
    void boundsOverManyDecadesLongAndEqualLabelsAreDrawn() throws Exception {
        List<Bar> bars = IntStream.rangeClosed(0, 40)
                .mapToObj(i -> new Bar("x".repeat(100), Side.UPPER, Math.pow(10, -8 * i), Math.pow(10, -8 * i)))
                .toList();
        Svg svg = Svg.parse(BoundsChart.svg("t", "x", bars));
        assertTrue(svg.shapes(VERMILION) >= bars.size());
    }

    @Test
    void aTitleKeepsItsSubjectAndIsCutInItsStudy() {
        assertEquals("short: subject", Charts.title("short", "subject"));
        String cut = Charts.title("s".repeat(200), "subject");
        assertTrue(cut.length() <= 90 && cut.endsWith("...: subject"), cut);
    }

    @Test
    void aJavaWithoutFontsIsSaidInOneLine() {
        StudyFile file = new StudyFile(
                Path.of("x.study"),
                "t",
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                Path.of("o"));
        BadInputException e = assertThrows(
                BadInputException.class,
                () -> Charts.draw(file, () -> {
                    throw new InternalError("java.lang.reflect.InvocationTargetException");
                }));
        assertEquals(
                "x.study: the report and its numbers are written, but this Java cannot draw letters"
                        + " (java.lang.reflect.InvocationTargetException); install fontconfig and a font for the charts",
                e.getMessage());
    }
}
