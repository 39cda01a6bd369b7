package org.minorant.core;

import java.io.IOException;
import java.nio.file.Path;
import java.util.function.Function;
import org.minorant.core.internal.file.FileSource;
import org.minorant.core.internal.file.RawMatrix;

/** From the numbers in a file to the types of this package; every refusal names the file. */
record OperatorFiles(String format, FileSource.Parser parser) {

    Operator operator(Path path) throws IOException {
        return read("readOperator", path, Function.identity());
    }

    HermitianOperator hermitian(Path path) throws IOException {
        return read("readHermitianOperator", path, HermitianOperator::of);
    }

    PositiveOperator positive(Path path) throws IOException {
        return read("readPositiveOperator", path, PositiveOperator::of);
    }

    DensityOperator density(Path path) throws IOException {
        return read("readDensityOperator", path, OperatorFiles::state);
    }

    /** A single column is a ket; 1 × 1 is the same either way. */
    private static DensityOperator state(Operator a) {
        if (a.columns() > 1 || a.rows() == 1) {
            return DensityOperator.of(a);
        }
        return DensityOperator.ofKet(a.realParts(), a.isReal() ? new double[a.rows()] : a.imaginaryParts());
    }

    private <T> T read(String method, Path path, Function<Operator, T> type) throws IOException {
        FileSource source = FileSource.of(format + "." + method, path);
        RawMatrix m = source.read(path, parser);
        try {
            return type.apply(new Operator(m.rows(), m.columns(), m.re(), m.im()));
        } catch (InvalidInputException e) {
            throw source.named(e);
        }
    }
}
