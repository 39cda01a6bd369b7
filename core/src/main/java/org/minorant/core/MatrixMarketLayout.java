package org.minorant.core;

/** How a Matrix Market file lists the entries of a matrix. */
public enum MatrixMarketLayout {
    /** Every entry, column by column. */
    ARRAY,
    /** Row, column and value of each entry that is not zero. */
    COORDINATE
}
