package org.minorant.benchmarks;

import java.lang.management.ManagementFactory;
import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Locale;
import org.openjdk.jmh.results.RunResult;
import org.openjdk.jmh.runner.Runner;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.ChainedOptionsBuilder;
import org.openjdk.jmh.runner.options.OptionsBuilder;
import org.openjdk.jmh.util.Statistics;

/**
 * Runs benchmarks between two measurements of one native LAPACK eigendecomposition (real symmetric, 1024 × 1024, values and vectors, one thread), if the native profile is on, and prints
 * least and median times in milliseconds and the median in units of the smaller median of the two.
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
        System.out.printf(Locale.ROOT, "load average before: %.2f%n", load());
        List<RunResult> units = new ArrayList<>(run(unit()));
        List<RunResult> results = new ArrayList<>();
        for (ChainedOptionsBuilder part : parts) {
            results.addAll(run(part));
        }
        units.addAll(run(unit()));
        double unit = units.stream().mapToDouble(UnitTable::median).min().orElse(Double.NaN);
        System.out.printf(Locale.ROOT, "%nload average after: %.2f%n", load());
        System.out.printf(
                Locale.ROOT, "%-20s %-28s %12s %12s %8s%n", parameter, "what", "least ms", "median ms", "units");
        for (RunResult r : units) {
            print(r, "", unit);
        }
        for (RunResult r : results) {
            print(r, r.getParams().getParam(parameter), unit);
        }
    }

    private static void print(RunResult r, String row, double unit) {
        String name = r.getParams().getBenchmark();
        System.out.printf(
                Locale.ROOT,
                "%-20s %-28s %12.1f %12.1f %8.2f%n",
                row,
                name.substring(name.lastIndexOf('.') + 1),
                times(r).getMin(),
                median(r),
                median(r) / unit);
    }

    private static ChainedOptionsBuilder unit() {
        return new OptionsBuilder()
                .include("\\.NativeEigenBenchmark\\.lapackDivideAndConquer")
                .param("dimension", "1024")
                .param("entries", "real");
    }

    private static Collection<RunResult> run(ChainedOptionsBuilder options) throws RunnerException {
        try {
            return new Runner(options.build()).run();
        } catch (RunnerException e) {
            // without the native profile there is no yardstick
            if (String.valueOf(e.getMessage()).contains("No benchmarks")) {
                return List.of();
            }
            throw e;
        }
    }

    private static Statistics times(RunResult r) {
        return r.getPrimaryResult().getStatistics();
    }

    private static double median(RunResult r) {
        return times(r).getPercentile(50);
    }

    private static double load() {
        return ManagementFactory.getOperatingSystemMXBean().getSystemLoadAverage();
    }
}
