package org.minorant.core.internal.file;

/**
 * A rows × columns matrix of finite numbers as read from a file.
 *
 * @param rows the number of rows
 * @param columns the number of columns
 * @param re real parts, row-major
 * @param im imaginary parts, row-major; empty if the file holds real numbers
 */
public record RawMatrix(int rows, int columns, double[] re, double[] im) {}
