package org.hazewright;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.Architectures.layeredArchitecture;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;

import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;

/** The drawing of the house, held: arrows point one way, and each library has its one room. */
@AnalyzeClasses(packages = "org.hazewright", importOptions = ImportOption.DoNotIncludeTests.class)
class ArchitectureTest {

    @ArchTest
    static final ArchRule arrows = layeredArchitecture()
            .consideringOnlyDependenciesInLayers()
            .withOptionalLayers(true)
            .layer("optics")
            .definedBy("org.hazewright.optics..")
            .layer("shelf")
            .definedBy("org.hazewright.shelf..")
            .layer("mixture")
            .definedBy("org.hazewright.mixture..")
            .layer("brief")
            .definedBy("org.hazewright.brief..")
            .layer("search")
            .definedBy("org.hazewright.search..")
            .layer("design")
            .definedBy("org.hazewright.design..")
            .layer("bench")
            .definedBy("org.hazewright.bench..")
            .layer("batch")
            .definedBy("org.hazewright.batch..")
            .layer("learning")
            .definedBy("org.hazewright.learning..")
            .layer("transport")
            .definedBy("org.hazewright.transport..")
            .layer("reading")
            .definedBy("org.hazewright.reading..")
            .layer("files")
            .definedBy("org.hazewright.files..")
            .layer("picture")
            .definedBy("org.hazewright.picture..")
            .layer("sheet")
            .definedBy("org.hazewright.sheet..")
            .layer("cli")
            .definedBy("org.hazewright.cli..")
            .layer("desk")
            .definedBy("org.hazewright.desk..")
            .whereLayer("optics")
            .mayNotAccessAnyLayer()
            .whereLayer("shelf")
            .mayOnlyAccessLayers("optics")
            .whereLayer("mixture")
            .mayOnlyAccessLayers("optics", "shelf")
            .whereLayer("brief")
            .mayOnlyAccessLayers("optics", "shelf")
            .whereLayer("search")
            .mayOnlyAccessLayers("optics")
            .whereLayer("design")
            .mayOnlyAccessLayers("optics", "shelf", "mixture", "brief", "search")
            .whereLayer("bench")
            .mayOnlyAccessLayers("optics", "shelf", "mixture", "brief", "search", "design")
            .whereLayer("batch")
            .mayOnlyAccessLayers("optics", "shelf", "mixture", "brief", "search", "design", "bench", "learning")
            .whereLayer("learning")
            .mayOnlyAccessLayers("optics", "shelf", "mixture")
            .whereLayer("transport")
            .mayOnlyAccessLayers("optics")
            .whereLayer("reading")
            .mayOnlyAccessLayers("optics", "shelf", "mixture", "transport")
            .whereLayer("files")
            .mayOnlyAccessLayers(
                    "optics",
                    "shelf",
                    "mixture",
                    "brief",
                    "search",
                    "design",
                    "bench",
                    "batch",
                    "learning",
                    "transport",
                    "reading")
            .whereLayer("picture")
            .mayOnlyAccessLayers(
                    "optics",
                    "shelf",
                    "mixture",
                    "brief",
                    "search",
                    "design",
                    "bench",
                    "batch",
                    "learning",
                    "transport",
                    "reading")
            .whereLayer("sheet")
            .mayOnlyAccessLayers(
                    "optics",
                    "shelf",
                    "mixture",
                    "brief",
                    "search",
                    "design",
                    "bench",
                    "batch",
                    "learning",
                    "transport",
                    "reading",
                    "files",
                    "picture")
            .whereLayer("cli")
            .mayNotBeAccessedByAnyLayer()
            .whereLayer("desk")
            .mayOnlyBeAccessedByLayers("cli")
            .because("the domain never knows how it is filed, printed or shown");

    @ArchTest
    static final ArchRule noCycles = slices().matching("org.hazewright.(*)..")
            .should()
            .beFreeOfCycles()
            .because("a room that needs its neighbour's neighbour back is not a room");

    @ArchTest
    static final ArchRule javafxOnlyInDesk =
            only("javafx..", "org.hazewright.desk..", "the core runs without a toolkit");

    @ArchTest
    static final ArchRule picturesOnlyInPicture =
            only("org.apache.batik..", "org.hazewright.picture..", "files of pictures are drawn in one room");

    @ArchTest
    static final ArchRule poiOnlyInSheet =
            only("org.apache.poi..", "org.hazewright.sheet..", "workbooks are one room's business");

    @ArchTest
    static final ArchRule tomlOnlyInFiles =
            only("org.tomlj..", "org.hazewright.files..", "files speak TOML, values do not");

    @ArchTest
    static final ArchRule picocliOnlyInCli =
            only("picocli..", "org.hazewright.cli..", "commands are thin and in one place");

    @ArchTest
    static final ArchRule consoleOnlyInCli = noClasses()
            .that()
            .resideOutsideOfPackage("org.hazewright.cli..")
            .should()
            .accessField(System.class, "out")
            .orShould()
            .accessField(System.class, "err")
            .orShould()
            .callMethod(System.class, "exit", int.class)
            .because("only a command speaks to a terminal or ends the program");

    @ArchTest
    static final ArchRule noDrawers = noClasses()
            .should()
            .haveSimpleNameEndingWith("Util")
            .orShould()
            .haveSimpleNameEndingWith("Utils")
            .orShould()
            .haveSimpleNameEndingWith("Helper")
            .orShould()
            .haveSimpleNameEndingWith("Manager")
            .orShould()
            .haveSimpleNameEndingWith("Impl")
            .because("a drawer has no idea of its own");

    @ArchTest
    static final ArchRule noLocaleTricks = noClasses()
            .should()
            .callMethod(java.util.Locale.class, "setDefault", java.util.Locale.class)
            .because("numbers are printed with a stated locale, not by changing everybody's");

    private static ArchRule only(String library, String room, String why) {
        return noClasses()
                .that()
                .resideOutsideOfPackage(room)
                .should()
                .dependOnClassesThat()
                .resideInAPackage(library)
                .because(why);
    }
}
