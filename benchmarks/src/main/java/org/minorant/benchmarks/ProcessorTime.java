package org.minorant.benchmarks;

import com.sun.management.OperatingSystemMXBean;
import java.lang.management.ManagementFactory;
import java.util.Collection;
import java.util.List;
import org.openjdk.jmh.infra.BenchmarkParams;
import org.openjdk.jmh.infra.IterationParams;
import org.openjdk.jmh.profile.InternalProfiler;
import org.openjdk.jmh.results.AggregationPolicy;
import org.openjdk.jmh.results.IterationResult;
import org.openjdk.jmh.results.Result;
import org.openjdk.jmh.results.ScalarResult;

/**
 * The processor time of the whole process for one call, in milliseconds: compilation, garbage collection and all threads included. Unlike elapsed time it does not count what other programs take on a
 * busy machine, though their use of its caches and of its memory shows.
 */
public final class ProcessorTime implements InternalProfiler {

    /** The name of the result. */
    static final String NAME = "processor";

    private final OperatingSystemMXBean system = (OperatingSystemMXBean) ManagementFactory.getOperatingSystemMXBean();

    private long before;

    @Override
    public String getDescription() {
        return "processor time of the process for one call";
    }

    @Override
    public void beforeIteration(BenchmarkParams benchmark, IterationParams iteration) {
        before = system.getProcessCpuTime();
    }

    @Override
    public Collection<? extends Result<?>> afterIteration(
            BenchmarkParams benchmark, IterationParams iteration, IterationResult result) {
        double nanos = system.getProcessCpuTime() - before;
        double calls = Math.max(1, result.getMetadata().getAllOps());
        return List.of(new ScalarResult(NAME, nanos / calls / 1e6, "ms/op", AggregationPolicy.AVG));
    }
}
