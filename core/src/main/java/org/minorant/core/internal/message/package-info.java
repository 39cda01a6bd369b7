/** The checks at the door and the wording of refusals, in one place. */
package org.minorant.core.internal.message;
