package org.minorant.core;

import java.lang.reflect.Method;

/** Measures how much memory an action takes on this thread, to show that hostile input takes none. */
final class AllocationMeter {

    private AllocationMeter() {}

    static long bytes(Runnable action) {
        long before = allocated();
        action.run();
        return allocated() - before;
    }

    /** By reflection, because the module under test does not read the management module. */
    private static long allocated() {
        try {
            Object bean = Class.forName("java.lang.management.ManagementFactory")
                    .getMethod("getThreadMXBean")
                    .invoke(null);
            Method m = Class.forName("com.sun.management.ThreadMXBean").getMethod("getCurrentThreadAllocatedBytes");
            return (long) m.invoke(bean);
        } catch (ReflectiveOperationException e) {
            throw new AssertionError(e);
        }
    }
}
