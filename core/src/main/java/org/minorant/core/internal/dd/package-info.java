/** Double-double loops on split row arrays. */
package org.minorant.core.internal.dd;
