package org.minorant.benchmarks;

import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.ChainedOptionsBuilder;
import org.openjdk.jmh.runner.options.OptionsBuilder;

/** Runs {@link CopiesBenchmark} beside the native unit, as {@link UnitTable} says. */
public final class CopiesTable {

    private CopiesTable() {}

    /**
     * Runs the benchmarks.
     *
     * @param args pairs to use instead of the usual ones, such as {@code "deep 10000"}
     * @throws RunnerException if JMH fails
     */
    public static void main(String[] args) throws RunnerException {
        ChainedOptionsBuilder copies = new OptionsBuilder().include("\\.CopiesBenchmark\\.");
        UnitTable.run("pair", args.length == 0 ? copies : copies.param("pair", args));
    }
}
