package org.minorant.architecture;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.classes;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.members;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.GeneralCodingRules.NO_CLASSES_SHOULD_ACCESS_STANDARD_STREAMS;

import com.tngtech.archunit.base.DescribedPredicate;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.domain.JavaCodeUnit;
import com.tngtech.archunit.core.domain.JavaField;
import com.tngtech.archunit.core.domain.JavaMember;
import com.tngtech.archunit.core.domain.JavaModifier;
import com.tngtech.archunit.core.domain.JavaType;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.Location;
import com.tngtech.archunit.lang.ArchCondition;
import com.tngtech.archunit.lang.ConditionEvents;
import com.tngtech.archunit.lang.SimpleConditionEvent;
import java.net.URI;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashSet;
import java.util.Set;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;

/** Who may use whom, read from the class files of the published modules. A rule that meets no class at all fails, too. */
class LayersTest {
    private static final String DOOR = "org.minorant.core.internal.door";

    private static JavaClasses published;

    @BeforeAll
    static void read() {
        published = new ClassFileImporter()
                .importLocations(BuiltModules.PUBLISHED.stream()
                        .map(BuiltModules::location)
                        .map(LayersTest::asLocation)
                        .toList());
    }

    /** Classes lie in a directory after {@code mvn test}, in a jar after {@code mvn verify}. */
    private static Location asLocation(Path built) {
        return Files.isDirectory(built) ? Location.of(built) : Location.of(URI.create("jar:" + built.toUri() + "!/"));
    }

    @Test
    void coreKnowsNothingAboveIt() {
        noClasses()
                .that()
                .resideInAPackage("org.minorant.core..")
                .should()
                .dependOnClassesThat()
                .resideInAnyPackage("org.minorant.measurement..", "org.minorant.bounds..")
                .check(published);
    }

    @Test
    void measurementKnowsNothingAboveIt() {
        noClasses()
                .that()
                .resideInAPackage("org.minorant.measurement..")
                .should()
                .dependOnClassesThat()
                .resideInAPackage("org.minorant.bounds..")
                .check(published);
    }

    @Test
    void everyClassLivesInOneOfTheThreeLayers() {
        classes()
                .should()
                .resideInAnyPackage("org.minorant.core..", "org.minorant.measurement..", "org.minorant.bounds..")
                .check(published);
    }

    @Test
    void onlyTheDoorUsesTheLinearAlgebraDependency() {
        noClasses()
                .that()
                .resideOutsideOfPackage(DOOR)
                .should()
                .dependOnClassesThat()
                .resideInAPackage("org.ojalgo..")
                .because("what that library does silently wrong is caught in one place")
                .check(published);
    }

    @Test
    void publicSignaturesNameOnlyThePlatformAndExportedTypes() {
        members()
                .that()
                .areDeclaredInClassesThat(areExported())
                .should(nameOnlyThePlatformAndExportedTypes())
                .check(published);
    }

    @Test
    void aLibraryPrintsNothing() {
        NO_CLASSES_SHOULD_ACCESS_STANDARD_STREAMS.check(published);
    }

    private static DescribedPredicate<JavaClass> areExported() {
        Set<String> exported = BuiltModules.exportedPackages();
        return DescribedPredicate.describe(
                "are public in an exported package",
                type -> exported.contains(type.getPackageName())
                        && type.getModifiers().contains(JavaModifier.PUBLIC));
    }

    private static ArchCondition<JavaMember> nameOnlyThePlatformAndExportedTypes() {
        Set<String> exported = BuiltModules.exportedPackages();
        return new ArchCondition<>("name only types of the platform or of exported packages, if seen from outside") {
            @Override
            public void check(JavaMember member, ConditionEvents events) {
                if (!isSeenFromOutside(member)) {
                    return;
                }
                for (JavaClass named : typesNamedBy(member)) {
                    String pack = named.getBaseComponentType().getPackageName();
                    boolean primitive = named.getBaseComponentType().isPrimitive();
                    boolean allowed = primitive || pack.startsWith("java.") || exported.contains(pack);
                    events.add(new SimpleConditionEvent(
                            member, allowed, member.getFullName() + " names " + named.getName()));
                }
            }
        };
    }

    private static boolean isSeenFromOutside(JavaMember member) {
        return member.getModifiers().contains(JavaModifier.PUBLIC)
                || member.getModifiers().contains(JavaModifier.PROTECTED);
    }

    private static Set<JavaClass> typesNamedBy(JavaMember member) {
        Stream<JavaType> declared;
        if (member instanceof JavaField field) {
            declared = Stream.of(field.getType());
        } else {
            JavaCodeUnit unit = (JavaCodeUnit) member;
            declared = Stream.of(
                            Stream.of(unit.getReturnType()),
                            unit.getParameterTypes().stream(),
                            unit.getThrowsClause().getTypes().stream().map(JavaType.class::cast))
                    .flatMap(types -> types);
        }
        Set<JavaClass> named = new LinkedHashSet<>();
        declared.forEach(type -> named.addAll(type.getAllInvolvedRawTypes()));
        // What a class extends or implements is part of what its users see, too.
        named.addAll(member.getOwner().getAllRawSuperclasses());
        named.addAll(member.getOwner().getAllRawInterfaces());
        return named;
    }
}
