/** The library's numbers beside those of general-purpose libraries: linear algebra in double (Hipparchus) and arbitrary precision (Apfloat). */
package org.minorant.tests.oracle;
