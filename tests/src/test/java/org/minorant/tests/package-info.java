/** What crosses the modules' borders: oracles, containment, properties, published values, documentation that executes. */
package org.minorant.tests;
