package org.minorant.study;

import java.io.IOException;
import java.nio.file.AccessDeniedException;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.OptionalDouble;
import org.minorant.core.DensityOperator;
import org.minorant.core.InvalidInputException;
import org.minorant.core.MatrixMarket;
import org.minorant.core.NumpyFile;
import org.minorant.core.Operator;
import org.minorant.core.Repaired;
import org.minorant.study.StudyFile.Repair;
import org.minorant.study.StudyFile.StateLine;

/** The states of a study, read from their files. */
final class States {

    /** What a study file can do about a matrix that rounding or an estimate has left beside the states. */
    private static final String NEAREST = "; or begin the line with 'nearest' to take the nearest state";

    private final Path study;
    private final Map<String, DensityOperator> byName = new HashMap<>();

    private final Map<String, Double> distances = new HashMap<>();

    private States(Path study) {
        this.study = study;
    }

    /** Reads every file; what is refused names the line of the study file and the place in the state file. */
    static States read(StudyFile file, Progress progress) {
        States states = new States(file.path());
        for (StateLine line : file.states()) {
            progress.step("reading " + line.file());
            states.byName.put(line.name(), states.read(line));
        }
        return states;
    }

    DensityOperator get(String name) {
        return byName.get(name);
    }

    /** How far a state was moved to become one, in Hilbert-Schmidt norm; empty if it was taken as it is. */
    OptionalDouble distance(String name) {
        Double distance = distances.get(name);
        return distance == null ? OptionalDouble.empty() : OptionalDouble.of(distance);
    }

    List<DensityOperator> get(List<String> names) {
        return names.stream().map(byName::get).toList();
    }

    /** Refuses states on different spaces, in the words of the study file. */
    void requireOneSpace(int line, List<String> names) {
        int d = get(names.get(0)).dimension();
        for (String name : names) {
            if (get(name).dimension() != d) {
                throw BadInputException.at(
                        study,
                        line,
                        "state " + names.get(0) + " has dimension " + d + " and state " + name + " has dimension "
                                + get(name).dimension() + "; they must be equal");
            }
        }
    }

    private DensityOperator read(StateLine line) {
        try {
            return readByEnding(line);
        } catch (InvalidInputException e) {
            String where = e.asked().replaceFirst("^[A-Za-z]+\\.[A-Za-z]+, ", "");
            // the readers give a cause where the file is well formed and its matrix was refused
            boolean repairable = line.repair() == Repair.NONE && e.getCause() instanceof InvalidInputException;
            String cure = e.cure() + (repairable ? NEAREST : "");
            throw fault(line, where + ": " + e.found() + ", expected " + e.limit() + "; " + cure);
        } catch (NoSuchFileException e) {
            throw fault(line, "there is no file " + line.file() + "; paths are relative to the study file's directory");
        } catch (AccessDeniedException e) {
            throw fault(line, line.file() + " may not be read; check its permissions");
        } catch (IOException e) {
            throw fault(line, line.file() + " cannot be read: " + e.getMessage());
        } catch (OutOfMemoryError e) {
            throw fault(line, line.file() + " does not fit in memory; give Java more, for example MAVEN_OPTS=-Xmx8g");
        }
    }

    private DensityOperator readByEnding(StateLine line) throws IOException {
        String name = String.valueOf(line.file().getFileName()).toLowerCase(Locale.ROOT);
        boolean repair = line.repair() == Repair.NEAREST;
        if (name.endsWith(".mtx")) {
            return repair
                    ? nearest(line, MatrixMarket.readOperator(line.file()))
                    : MatrixMarket.readDensityOperator(line.file());
        }
        if (name.endsWith(".npy")) {
            return repair
                    ? nearest(line, NumpyFile.readOperator(line.file()))
                    : NumpyFile.readDensityOperator(line.file());
        }
        throw fault(
                line,
                line.file() + " ends in neither .mtx (Matrix Market) nor .npy (NumPy), the formats that are read");
    }

    private DensityOperator nearest(StateLine line, Operator given) {
        Repaired<DensityOperator> repaired = DensityOperator.nearest(given);
        distances.put(line.name(), repaired.distance());
        return repaired.operator();
    }

    private BadInputException fault(StateLine line, String message) {
        return BadInputException.at(study, line.line(), "state " + line.name() + ": " + message);
    }
}
