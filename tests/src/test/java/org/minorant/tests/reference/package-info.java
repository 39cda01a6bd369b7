/**
 * Arbitrary-precision answers, computed by other means than the library's: {@link ReferenceMinimum} from {@link ReferenceOperator}s with
 * Householder and QR steps on {@link FixedPoint} integers, checked on a sample by {@link ApfloatJacobi}.
 */
package org.minorant.tests.reference;
