package org.minorant.benchmarks;

import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import org.openjdk.jmh.profile.GCProfiler;
import org.openjdk.jmh.results.Result;
import org.openjdk.jmh.results.RunResult;
import org.openjdk.jmh.runner.Runner;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.ChainedOptionsBuilder;
import org.openjdk.jmh.runner.options.OptionsBuilder;

/**
 * Runs {@link CostBenchmark}, and the native yardstick if it was compiled in, as one JMH run and prints a table of ratios: time of each
 * benchmark over that of the decomposition, and bytes allocated over d² doubles. Times are medians; the smallest is given beside them, as it is
 * what a busy machine disturbs least.
 */
public final class CostTable {

    private static final String BASE = "decomposition";

    private CostTable() {}

    /**
     * Runs the benchmarks.
     *
     * @param args dimensions to use instead of 64, 128, 256
     * @throws RunnerException if JMH fails
     */
    public static void main(String[] args) throws RunnerException {
        ChainedOptionsBuilder options = new OptionsBuilder()
                .include("\\.CostBenchmark\\.")
                .include("\\.NativeEigenBenchmark\\.")
                .addProfiler(GCProfiler.class);
        if (args.length != 0) {
            options = options.param("dimension", args);
        }
        Map<String, Map<String, RunResult>> groups = new TreeMap<>();
        for (RunResult r : new Runner(options.build()).run()) {
            String key = String.format(
                    Locale.ROOT,
                    "%5s %-8s",
                    r.getParams().getParam("dimension"),
                    r.getParams().getParam("entries"));
            String name = r.getParams().getBenchmark();
            groups.computeIfAbsent(key, k -> new TreeMap<>()).put(name.substring(name.lastIndexOf('.') + 1), r);
        }
        print(groups);
    }

    private static void print(Map<String, Map<String, RunResult>> groups) {
        System.out.printf(
                Locale.ROOT,
                "%n%5s %-8s %-28s %12s %8s %12s %8s %14s%n",
                "d",
                "entries",
                "what",
                "median ms",
                "ratio",
                "least ms",
                "ratio",
                "d² doubles");
        groups.forEach((key, results) -> {
            double median = quantile(results.get(BASE), 50);
            double least = quantile(results.get(BASE), 0);
            double d = Double.parseDouble(key.trim().split(" +")[0]);
            results.forEach((name, r) -> System.out.printf(
                    Locale.ROOT,
                    "%s %-28s %12.3f %8.2f %12.3f %8.2f %14.2f%n",
                    key,
                    name,
                    quantile(r, 50),
                    quantile(r, 50) / median,
                    quantile(r, 0),
                    quantile(r, 0) / least,
                    allocated(r) / (8 * d * d)));
        });
    }

    private static double quantile(RunResult r, double percent) {
        return r.getPrimaryResult().getStatistics().getPercentile(percent);
    }

    private static double allocated(RunResult r) {
        Result<?> bytes = r.getSecondaryResults().get("gc.alloc.rate.norm");
        if (bytes == null) {
            bytes = r.getSecondaryResults().get("·gc.alloc.rate.norm");
        }
        return bytes == null ? Double.NaN : bytes.getScore();
    }
}
