/**
 * Values from outside the project, end to end through the public interface: one class for each table of the project's list of check values, as far as one
 * use covers it. Each row carries its source: published, computed by an independent program, or from memory.
 */
package org.minorant.tests.published;
