package org.hazewright.desk;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;

import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;

/** What the window shows is told apart from how it is shown. */
@AnalyzeClasses(packages = "org.hazewright.desk", importOptions = ImportOption.DoNotIncludeTests.class)
class DeskArchitectureTest {
    @ArchTest
    static final ArchRule modelsKnowNoScene = noClasses()
            .that()
            .resideInAPackage("org.hazewright.desk.model..")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("javafx.scene..", "javafx.stage..", "javafx.application..", "javafx.animation..")
            .because("what is shown is tested without a toolkit");

    @ArchTest
    static final ArchRule drawingsKnowOnlyThePen = noClasses()
            .that()
            .haveSimpleName("SpectraPlot")
            .or()
            .haveSimpleName("SharesBelow")
            .or()
            .haveSimpleName("ComparePlot")
            .or()
            .haveSimpleName("RecipePaper")
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage("javafx..", "org.apache.pdfbox..")
            .because("one drawing serves screen, picture files and paper");

    @ArchTest
    static final ArchRule threadsOnlyInWork = noClasses()
            .that()
            .doNotHaveFullyQualifiedName("org.hazewright.desk.model.Work")
            .should()
            .dependOnClassesThat()
            .haveFullyQualifiedName("java.util.concurrent.ExecutorService")
            .orShould()
            .dependOnClassesThat()
            .haveFullyQualifiedName("java.lang.Thread")
            .because("there is one runner of work");
}
