package org.minorant.benchmarks;

import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Locale;
import org.openjdk.jmh.results.RunResult;
import org.openjdk.jmh.runner.Runner;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.ChainedOptionsBuilder;
import org.openjdk.jmh.runner.options.OptionsBuilder;

/**
 * Runs {@link CopiesBenchmark} beside one native LAPACK eigendecomposition (real symmetric, 1024 × 1024, values and vectors, one thread), if the native profile is on, and prints medians
 * in milliseconds and in units of it.
 */
public final class CopiesTable {

    private CopiesTable() {}

    /**
     * Runs the benchmarks.
     *
     * @param args pairs to use instead of the usual ones, such as {@code "deep 10000"}
     * @throws RunnerException if JMH fails
     */
    public static void main(String[] args) throws RunnerException {
        List<RunResult> results = new ArrayList<>(run(new OptionsBuilder()
                .include("\\.NativeEigenBenchmark\\.lapackDivideAndConquer")
                .param("dimension", "1024")
                .param("entries", "real")));
        double unit = results.isEmpty() ? Double.NaN : median(results.get(0));
        ChainedOptionsBuilder copies = new OptionsBuilder().include("\\.CopiesBenchmark\\.");
        if (args.length != 0) {
            copies = copies.param("pair", args);
        }
        results.addAll(run(copies));
        System.out.printf(Locale.ROOT, "%n%-12s %-28s %12s %8s%n", "pair", "what", "median ms", "units");
        for (RunResult r : results) {
            String name = r.getParams().getBenchmark();
            String pair = r.getParams().getParam("pair");
            System.out.printf(
                    Locale.ROOT,
                    "%-12s %-28s %12.1f %8.2f%n",
                    pair == null ? "" : pair,
                    name.substring(name.lastIndexOf('.') + 1),
                    median(r),
                    median(r) / unit);
        }
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

    private static double median(RunResult r) {
        return r.getPrimaryResult().getStatistics().getPercentile(50);
    }
}
