/** The only package that calls the linear-algebra dependency; it checks shapes and finiteness and copies out. */
package org.minorant.core.internal.door;
