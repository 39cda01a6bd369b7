package org.minorant.benchmarks;

import java.lang.management.ManagementFactory;
import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Locale;
import org.openjdk.jmh.results.Result;
import org.openjdk.jmh.results.RunResult;
import org.openjdk.jmh.runner.Runner;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.ChainedOptionsBuilder;
import org.openjdk.jmh.runner.options.OptionsBuilder;
import org.openjdk.jmh.util.Statistics;

/**
 * Runs benchmarks between two measurements of one native LAPACK eigendecomposition (real symmetric, 1024 × 1024, values and vectors, one thread), if the native profile is on. Prints elapsed time and
 * {@linkplain ProcessorTime processor time}, least and median, in milliseconds and in units of what the eigendecomposition takes: medians over the smaller of its two medians.
 */
final class UnitTable {

    private UnitTable() {}

    /**
     * Runs and prints.
     *
     * @param parameter the parameter that names a row
     * @param parts the benchmarks
     */
    static void run(String parameter, ChainedOptionsBuilder... parts) throws RunnerException {
        double load = load();
        List<RunResult> units = new ArrayList<>(run(unit()));
        List<RunResult> results = new ArrayList<>();
        for (ChainedOptionsBuilder part : parts) {
            results.addAll(run(part));
        }
        units.addAll(run(unit()));
        double elapsed = least(units, true);
        double processor = least(units, false);
        System.out.printf(Locale.ROOT, "%nload average %.2f before, %.2f after%n", load, load());
        System.out.printf("%-18s %-24s %-32s %s%n", parameter, "what", "elapsed: least, median, units", "processor");
        for (RunResult r : units) {
            print(r, "", elapsed, processor);
        }
        for (RunResult r : results) {
            print(r, r.getParams().getParam(parameter), elapsed, processor);
        }
    }

    private static void print(RunResult r, String row, double elapsed, double processor) {
        String name = r.getParams().getBenchmark();
        System.out.printf(
                Locale.ROOT,
                "%-18s %-24s %s %s%n",
                row,
                name.substring(name.lastIndexOf('.') + 1),
                text(times(r, true), elapsed),
                text(times(r, false), processor));
    }

    private static String text(Statistics s, double unit) {
        double median = s.getPercentile(50);
        return String.format(Locale.ROOT, "%10.1f %10.1f %8.2f", s.getMin(), median, median / unit);
    }

    private static ChainedOptionsBuilder unit() {
        return new OptionsBuilder()
                .include("\\.NativeEigenBenchmark\\.lapackDivideAndConquer")
                .param("dimension", "1024")
                .param("entries", "real");
    }

    private static Collection<RunResult> run(ChainedOptionsBuilder options) throws RunnerException {
        try {
            return new Runner(options.addProfiler(ProcessorTime.class).build()).run();
        } catch (RunnerException e) {
            // without the native profile there is no yardstick
            if (String.valueOf(e.getMessage()).contains("No benchmarks")) {
                return List.of();
            }
            throw e;
        }
    }

    private static double least(List<RunResult> units, boolean elapsed) {
        return units.stream()
                .mapToDouble(r -> times(r, elapsed).getPercentile(50))
                .min()
                .orElse(Double.NaN);
    }

    private static Statistics times(RunResult r, boolean elapsed) {
        Result<?> result =
                elapsed ? r.getPrimaryResult() : r.getSecondaryResults().get(ProcessorTime.NAME);
        return result.getStatistics();
    }

    private static double load() {
        return ManagementFactory.getOperatingSystemMXBean().getSystemLoadAverage();
    }
}
