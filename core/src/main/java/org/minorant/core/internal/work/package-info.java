/** What long computations do beside their work. */
package org.minorant.core.internal.work;
