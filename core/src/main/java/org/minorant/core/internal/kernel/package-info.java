/** Loops over row arrays, shaped so that the compiler vectorises them. */
package org.minorant.core.internal.kernel;
