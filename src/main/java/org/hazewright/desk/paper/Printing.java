package org.hazewright.desk.paper;

import java.time.LocalDate;
import java.util.Optional;
import java.util.function.Consumer;
import javafx.print.PageLayout;
import javafx.print.PageOrientation;
import javafx.print.Paper;
import javafx.print.Printer;
import javafx.print.PrinterJob;
import javafx.scene.canvas.Canvas;
import javafx.scene.transform.Scale;
import javafx.stage.Window;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Outlook;
import org.hazewright.desk.pen.Pen;

/** Sends a recipe to a printer of the system's. */
public final class Printing {
    private Printing() {}

    /** Asks for a printer and prints; gives what went wrong, in words. Empty also when the person thought better of it. */
    public static Optional<String> print(Window owner, Outlook outlook, Answer answer, Consumer<Pen> spectra) {
        PrinterJob job = PrinterJob.createPrinterJob();
        if (job == null)
            return Optional.of("No printer is set up on this system. Save the recipe as PDF and print that elsewhere.");
        if (!job.showPrintDialog(owner)) return Optional.empty();
        ScreenPaper paper = new ScreenPaper();
        new RecipePaper(paper, outlook, answer, LocalDate.now()).draw(spectra);
        PageLayout layout = job.getPrinter()
                .createPageLayout(Paper.A4, PageOrientation.PORTRAIT, Printer.MarginType.HARDWARE_MINIMUM);
        double fit = Math.min(
                        layout.getPrintableWidth() / org.hazewright.desk.paper.Paper.WIDTH,
                        layout.getPrintableHeight() / org.hazewright.desk.paper.Paper.HEIGHT)
                / ScreenPaper.FINE;
        for (Canvas page : paper.pages()) {
            page.getTransforms().add(new Scale(fit, fit));
            if (!job.printPage(layout, page)) {
                job.cancelJob();
                return Optional.of("The printer did not take the page; look at it and try again.");
            }
        }
        return job.endJob() ? Optional.empty() : Optional.of("The printer did not end the job; look at it.");
    }
}
