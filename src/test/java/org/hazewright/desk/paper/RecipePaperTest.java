package org.hazewright.desk.paper;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.LocalDate;
import org.apache.pdfbox.Loader;
import org.apache.pdfbox.pdmodel.PDDocument;
import org.apache.pdfbox.text.PDFTextStripper;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answering;
import org.hazewright.bench.Outlook;
import org.hazewright.desk.model.Words;
import org.hazewright.files.BriefReader;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.Item;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The recipe on paper holds what a person needs at a balance without a screen. */
class RecipePaperTest {
    @ParameterizedTest
    @ValueSource(strings = {"forearm-block", "bench-slab", "clear-window"})
    void gramsStepsAndSignsAreOnThePages(String name) throws Exception {
        Answer a = Answering.to(BriefReader.readShipped(name), ShelfReader.readShipped(), 0);
        Outlook o = new Outlook(a.brief(), a.recipe(), a.predicted(), a.budget(), a.chance());
        byte[] bytes;
        try (PdfPaper paper = new PdfPaper(a.brief().title())) {
            new RecipePaper(paper, o, a, LocalDate.of(2026, 3, 2)).draw(pen -> {});
            bytes = paper.bytes();
        }
        try (PDDocument back = Loader.loadPDF(bytes)) {
            String text = new PDFTextStripper().getText(back);
            for (Item i : a.recipe().items())
                assertTrue(text.contains(Words.grams(i.massG(), a.brief().balance()) + " g"), i.label());
            assertTrue(text.contains("µa") && text.contains("µs′"), "signs are letters, not boxes");
            assertTrue(text.contains("What holds it back") || a.limits().isEmpty());
            assertTrue(!text.contains("?"), "a letter that the font lacks: " + text);
            assertEquals(a.brief().title(), back.getDocumentInformation().getTitle());
            assertTrue(back.getNumberOfPages() <= 4, back.getNumberOfPages() + " pages");
        }
    }
}
