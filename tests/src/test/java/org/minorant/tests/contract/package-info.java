/** Documentation that executes: the lines a user was promised, and the Java blocks of the README, are regions of tests here. */
package org.minorant.tests.contract;
