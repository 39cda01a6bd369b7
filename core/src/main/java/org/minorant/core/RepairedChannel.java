package org.minorant.core;

/**
 * A channel that was made trace preserving, with what that took.
 *
 * @param channel the result
 * @param traceDefectBefore ‖Σ K*K − 1‖_F of the given Kraus operators, rounded up
 */
public record RepairedChannel(KrausChannel channel, double traceDefectBefore) {}
