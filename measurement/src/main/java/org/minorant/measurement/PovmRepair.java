package org.minorant.measurement;

import java.util.ArrayList;
import java.util.List;
import org.minorant.core.EnclosedMatrix;
import org.minorant.core.EnclosedSpectrum;
import org.minorant.core.HermitianOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.core.Operator;

/** Makes a measurement of operators that nearly form one: see {@link Povm#nearest}. */
final class PovmRepair {

    private PovmRepair() {}

    static RepairedPovm of(List<? extends Operator> operators) {
        String asked = "Povm.nearest";
        Checks.notEmpty(asked, "operator", operators);
        int d = operators.get(0).rows();
        ColumnBlocks.Builder blocks = new ColumnBlocks.Builder(d);
        double hermitianDefect = 0;
        double negativePart = 0;
        for (int j = 0; j < operators.size(); j++) {
            Operator a = operators.get(j);
            if (a.rows() != d || a.columns() != d) {
                throw new InvalidInputException(
                        asked,
                        "operator " + j + " is " + a.rows() + " x " + a.columns(),
                        d + " x " + d,
                        "all must be square and of one dimension");
            }
            EnclosedMatrix m = EnclosedMatrix.of(a);
            hermitianDefect =
                    Math.max(hermitianDefect, m.minus(m.adjoint()).times(0.5).frobeniusUpper());
            EnclosedSpectrum s =
                    EnclosedSpectrum.of(m.plus(m.adjoint()).times(0.5).midpoint());
            double negative = 0;
            int first = 0;
            while (first < d && s.value(first) <= 0) {
                negative -= s.value(first++);
            }
            negativePart = Math.max(negativePart, negative);
            addPositivePart(blocks, s, first);
        }
        List<HermitianOperator> elements = new ArrayList<>();
        double completenessDefect = Math.sqrt(d);
        HermitianOperator rest = HermitianOperator.identity(d);
        if (blocks.width() == 0) {
            operators.forEach(a -> elements.add(HermitianOperator.identity(d).times(0)));
        } else {
            ColumnBlocks z = blocks.build();
            EnclosedMatrix sum = z.matrix().times(z.matrix().adjoint());
            completenessDefect = sum.minus(EnclosedMatrix.identity(d)).frobeniusUpper();
            PolarFactors polar = PolarFactors.of(z.matrix());
            elements.addAll(z.measurement(polar));
            rest = polar.rank() == d ? rest.times(0) : ColumnBlocks.kernel(polar);
        }
        HermitianOperator share = rest.times(1.0 / operators.size());
        elements.replaceAll(share::plus);
        return new RepairedPovm(
                Povm.of(elements), hermitianDefect, negativePart, completenessDefect, distance(elements, operators));
    }

    private static void addPositivePart(ColumnBlocks.Builder blocks, EnclosedSpectrum s, int first) {
        int d = s.dimension();
        if (first == d) {
            blocks.addEmpty();
            return;
        }
        EnclosedMatrix v = s.vectors();
        EnclosedMatrix.Builder x = EnclosedMatrix.builder(d, d - first);
        for (int c = first; c < d; c++) {
            double root = Math.sqrt(s.value(c));
            for (int i = 0; i < d; i++) {
                x.set(i, c - first, root * v.re(i, c), 0, root * v.im(i, c), 0, 0);
            }
        }
        blocks.add(x.build());
    }

    private static double distance(List<HermitianOperator> elements, List<? extends Operator> operators) {
        double s = 0;
        for (int j = 0; j < elements.size(); j++) {
            double x =
                    EnclosedMatrix.of(elements.get(j).minus(operators.get(j))).frobeniusUpper();
            s += x * x;
        }
        return Math.sqrt(s);
    }
}
