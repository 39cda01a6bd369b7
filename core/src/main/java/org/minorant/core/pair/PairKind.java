package org.minorant.core.pair;

/** How a positive pair evaluates its trace-minimum curve. */
public enum PairKind {
    /** Both operators are diagonal in one basis: Σ min(a_i, t b_i). */
    COMMUTING,
    /** One operator has rank one: the root of a secular equation. */
    RANK_ONE,
    /** Both are sums of squares: hyperbolic rotations and a certificate of relative accuracy. */
    FACTORED,
    /** Dense matrices: one Hermitian eigendecomposition and its residual; as {@link #FACTORED} where that is too wide. */
    DENSE,
    /** Blocks that do not interact: the sum of the blocks' curves. */
    DIRECT_SUM,
    /** Copies of two commuting operators: a sum over types, that is over the counts of each eigenvalue. */
    TYPES,
    /** Copies of two qubit operators: blocks of total spin, each as {@link #FACTORED}. */
    SPIN_BLOCKS,
    /** Copies of two operators of dimension three or more: irreducible blocks of the general linear group, each as {@link #FACTORED}. */
    UNITARY_BLOCKS
}
