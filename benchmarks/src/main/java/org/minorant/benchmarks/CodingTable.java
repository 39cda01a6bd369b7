package org.minorant.benchmarks;

import java.util.Arrays;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.ChainedOptionsBuilder;
import org.openjdk.jmh.runner.options.OptionsBuilder;
import org.openjdk.jmh.runner.options.TimeValue;

/** Runs {@link CodingBenchmark} beside the native unit, as {@link UnitTable} says, mixed qubits in 1 GB and after one warm-up value. */
public final class CodingTable {

    private CodingTable() {}

    /**
     * Runs the benchmarks.
     *
     * @param args none for the usual table, otherwise a method of the benchmark and channels: {@code achievable "qubits 32"}
     * @throws RunnerException if JMH fails
     */
    public static void main(String[] args) throws RunnerException {
        if (args.length > 1) {
            UnitTable.run(
                    "channel",
                    Arrays.stream(args).skip(1).map(c -> of(args[0], c)).toArray(ChainedOptionsBuilder[]::new));
            return;
        }
        UnitTable.run(
                "channel",
                of("bothSides", "kets 100000"),
                of("withUnion", "bsc 1000"),
                of("achievable", "qubits 16"),
                of("bothSides", "symmetric 500"));
    }

    private static ChainedOptionsBuilder of(String method, String channel) {
        ChainedOptionsBuilder options = new OptionsBuilder()
                .include("\\.CodingBenchmark\\." + method + "$")
                .param("channel", channel)
                .timeout(TimeValue.hours(1));
        // values of seconds and minutes
        return channel.startsWith("symmetric") || channel.startsWith("qubits")
                ? options.warmupIterations(1).measurementIterations(2).jvmArgsAppend("-Xmx1g")
                : options;
    }
}
