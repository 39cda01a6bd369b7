/**
 * Divergences of two states, and certified bounds with their sources: read {@link org.minorant.bounds.Divergences}, then {@link
 * org.minorant.bounds.Bound}, {@link org.minorant.bounds.Ledger} and what fills a ledger.
 */
package org.minorant.bounds;
