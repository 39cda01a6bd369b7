package org.minorant.benchmarks;

import java.util.Arrays;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.ChainedOptionsBuilder;
import org.openjdk.jmh.runner.options.OptionsBuilder;
import org.openjdk.jmh.runner.options.TimeValue;

/** Runs {@link CodingBenchmark} beside the native unit, as {@link UnitTable} says, mixed qubits in 1 GB and after fewer warm-up values. */
public final class CodingTable {

    private CodingTable() {}

    /**
     * Runs the benchmarks.
     *
     * @param args none for the usual table, otherwise a method of the benchmark and channels: {@code bothSides "kets 1000000"}
     * @throws RunnerException if JMH fails
     */
    public static void main(String[] args) throws RunnerException {
        if (args.length > 1) {
            String[] channels = Arrays.copyOfRange(args, 1, args.length);
            UnitTable.run("channel", of(args[0], channels));
            return;
        }
        UnitTable.run(
                "channel",
                of("bothSides", "kets 100000"),
                of("withUnion", "bsc 1000"),
                few(of("bothSides", "symmetric 500")),
                few(of("achievable", "qubits 16", "qubits 32")));
    }

    private static ChainedOptionsBuilder of(String method, String... channels) {
        return new OptionsBuilder()
                .include("\\.CodingBenchmark\\." + method + "$")
                .param("channel", channels)
                .timeout(TimeValue.hours(1));
    }

    private static ChainedOptionsBuilder few(ChainedOptionsBuilder options) {
        return options.warmupIterations(2).measurementIterations(3).jvmArgsAppend("-Xmx1g");
    }
}
