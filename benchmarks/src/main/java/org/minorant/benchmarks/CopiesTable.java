package org.minorant.benchmarks;

import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.ChainedOptionsBuilder;
import org.openjdk.jmh.runner.options.OptionsBuilder;

/** Runs {@link CopiesBenchmark} beside the native unit, as {@link UnitTable} says. */
public final class CopiesTable {

    private static final String[] KINDS = {
        "length-0.5 100",
        "length-0.9 100",
        "length-0.99 100",
        "kets 100",
        "length-0.9 200",
        "length-0.9 400",
        "d-3 4",
        "d-3 8",
        "d-3 12",
        "d-4 4",
        "d-4 6"
    };

    private CopiesTable() {}

    /**
     * Runs the benchmarks.
     *
     * @param args pairs to use instead of the usual ones, such as {@code "deep 10000"}, or {@code kinds}: by number, dimension and purity
     * @throws RunnerException if JMH fails
     */
    public static void main(String[] args) throws RunnerException {
        if (args.length == 0) {
            UnitTable.run("pair", copies());
        } else if (args[0].equals("kinds")) {
            // the warm-up of the benchmark would take an hour
            UnitTable.run("pair", copies().param("pair", KINDS).warmupIterations(3));
        } else {
            UnitTable.run("pair", copies().param("pair", args));
        }
    }

    private static ChainedOptionsBuilder copies() {
        return new OptionsBuilder().include("\\.CopiesBenchmark\\.");
    }
}
