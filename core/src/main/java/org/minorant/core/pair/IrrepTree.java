package org.minorant.core.pair;

import java.nio.IntBuffer;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.minorant.core.InvalidInputException;

/**
 * In which order overlaps of representations are made from each other. As π of λ + (1, …, 1) is det U times that of λ, and a common phase does not matter, shapes are taken with λ_d = 0. The parent of a shape lacks a box
 * in its last row that is not empty; walking depth first, few matrices are alive at once.
 *
 * <p>Each node knows the thresholds of its windows: the least that a block below it needs.
 */
final class IrrepTree {

    /** Windows up to this size are made whole, as columns in the whole space guide rotations best. */
    static final int WHOLE = 1000;

    private static final int MOST_PATTERNS = 6000;
    private static final double MOST_CELLS = 1e7;

    /** A shape whose overlaps are made. */
    static final class Node {
        private final int[] shape;
        private final int row;
        private Node parent;
        private final List<Node> children = new ArrayList<>();
        private double firstThreshold = Double.POSITIVE_INFINITY;
        private double secondThreshold = Double.POSITIVE_INFINITY;
        private int waiting;
        private IrrepOverlaps overlaps;

        private Node(int[] shape, int row) {
            this.shape = shape;
            this.row = row;
        }
    }

    private final QuditOverlaps u;
    private final UnitaryBlocksPlan.Logs first;
    private final UnitaryBlocksPlan.Logs second;
    private final Map<IntBuffer, Node> nodes = new HashMap<>();
    private final List<Node> order = new ArrayList<>();
    private final Map<UnitaryBlocksPlan.Block, Node> ends = new java.util.IdentityHashMap<>();
    private int next;

    IrrepTree(QuditOverlaps u, UnitaryBlocksPlan.Logs first, UnitaryBlocksPlan.Logs second) {
        this.u = u;
        this.first = first;
        this.second = second;
    }

    /** The patterns of a shape as those of the shape without its full columns. */
    static List<int[]> reduced(List<int[]> patterns, int by) {
        return patterns.stream()
                .map(p -> java.util.Arrays.stream(p).map(x -> x - by).toArray())
                .toList();
    }

    private static int[] reduced(int[] shape) {
        int by = shape[shape.length - 1];
        return java.util.Arrays.stream(shape).map(x -> x - by).toArray();
    }

    /** The blocks in the order in which their overlaps will be made. */
    List<UnitaryBlocksPlan.Block> ordered(List<UnitaryBlocksPlan.Block> blocks) {
        for (UnitaryBlocksPlan.Block block : blocks) {
            int[] shape = reduced(block.shape());
            int by = block.shape()[shape.length - 1];
            Node node = node(shape);
            boolean whole = Partitions.dimension(shape).bitLength() < 31
                    && Partitions.dimension(shape).intValue() <= WHOLE;
            double a = whole ? Double.NEGATIVE_INFINITY : least(first, shape, reduced(block.first(), by));
            double b = least(second, shape, reduced(block.second(), by));
            for (Node x = node; x != null; x = x.parent) {
                x.firstThreshold = Math.min(x.firstThreshold, a);
                x.secondThreshold = Math.min(x.secondThreshold, b);
            }
            ends.put(block, node);
        }
        walk(node(new int[u.dimension()]));
        Map<Node, Integer> place = new HashMap<>();
        for (Node x : order) {
            place.put(x, place.size());
        }
        return blocks.stream()
                .sorted(java.util.Comparator.comparingInt(b -> place.get(ends.get(b))))
                .toList();
    }

    private static double least(UnitaryBlocksPlan.Logs logs, int[] shape, List<int[]> patterns) {
        double least = 0;
        for (int[] p : patterns) {
            least = Math.min(least, PatternWindow.log(shape, p, logs.relative()));
        }
        return least;
    }

    private Node node(int[] shape) {
        Node known = nodes.get(IntBuffer.wrap(shape));
        if (known != null) {
            return known;
        }
        int row = shape.length - 1;
        while (row >= 0 && shape[row] == 0) {
            row--;
        }
        Node node = new Node(shape, row);
        nodes.put(IntBuffer.wrap(shape), node);
        if (row >= 0) {
            int[] less = shape.clone();
            less[row]--;
            node.parent = node(less);
            node.parent.children.add(node);
        }
        return node;
    }

    /** A child that starts a new row comes before the one that goes on with the last, so that only the latter's parents wait. */
    private void walk(Node root) {
        Node node = root;
        while (node != null) {
            order.add(node);
            node.waiting = node.children.size();
            Node same = null;
            for (Node child : node.children) {
                if (child.row == node.row) {
                    same = child;
                } else {
                    walk(child);
                }
            }
            node = same;
        }
    }

    /** Makes overlaps up to those of a block, which come after those asked for before. */
    IrrepOverlaps overlaps(UnitaryBlocksPlan.Block block, Runnable stop) {
        Node end = ends.get(block);
        while (end.overlaps == null) {
            Node x = order.get(next++);
            PatternWindow rows = window(x, first, x.firstThreshold);
            PatternWindow columns = window(x, second, x.secondThreshold);
            if ((double) rows.size() * columns.size() > MOST_CELLS) {
                throw refusal(x.shape, rows.size() + " by " + columns.size() + " overlaps");
            }
            if (x.parent == null) {
                x.overlaps = IrrepOverlaps.trivial(rows, columns, u.isReal());
            } else {
                x.overlaps = x.parent.overlaps.plusBox(u, rows, columns, x.row, stop);
                release(x.parent);
            }
        }
        IrrepOverlaps o = end.overlaps;
        if (end.waiting == 0) {
            end.overlaps = null;
        }
        return o;
    }

    /** Overlaps are let go when the last child has been made; a block takes its own before that. */
    private static void release(Node parent) {
        parent.waiting--;
        if (parent.waiting == 0) {
            parent.overlaps = null;
        }
    }

    private static PatternWindow window(Node x, UnitaryBlocksPlan.Logs logs, double threshold) {
        try {
            return new PatternWindow(x.shape, logs.relative(), threshold, MOST_PATTERNS);
        } catch (PatternWindow.TooMany e) {
            throw refusal(x.shape, "more than " + MOST_PATTERNS + " patterns");
        }
    }

    private static InvalidInputException refusal(int[] shape, String found) {
        return new InvalidInputException(
                "PositivePair.copies",
                "the block of shape " + java.util.Arrays.toString(shape) + " needs " + found,
                MOST_PATTERNS + " patterns and " + (long) MOST_CELLS + " overlaps",
                "take fewer copies or a larger tolerance, or bound the answer");
    }
}
