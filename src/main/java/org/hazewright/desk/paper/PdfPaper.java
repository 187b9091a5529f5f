package org.hazewright.desk.paper;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import org.apache.pdfbox.pdmodel.PDDocument;
import org.apache.pdfbox.pdmodel.PDPage;
import org.apache.pdfbox.pdmodel.PDPageContentStream;
import org.apache.pdfbox.pdmodel.common.PDRectangle;
import org.apache.pdfbox.pdmodel.font.PDFont;
import org.apache.pdfbox.pdmodel.font.PDType0Font;
import org.apache.pdfbox.pdmodel.graphics.state.PDExtendedGraphicsState;
import org.hazewright.desk.pen.Pen;

/** Pages of a PDF file, letters embedded. */
public final class PdfPaper implements Paper, AutoCloseable {
    private final PDDocument document = new PDDocument();
    private final PDFont plain;
    private final PDFont bold;
    private PDPageContentStream content;

    public PdfPaper(String title) {
        try {
            plain = font("DejaVuSans.ttf");
            bold = font("DejaVuSans-Bold.ttf");
            document.getDocumentInformation().setTitle(title);
            document.getDocumentInformation().setCreator("Hazewright");
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    private PDFont font(String name) throws IOException {
        try (InputStream in = PdfPaper.class.getResourceAsStream(name)) {
            return PDType0Font.load(document, in);
        }
    }

    @Override
    public Pen nextPage() {
        try {
            finish();
            PDPage page = new PDPage(new PDRectangle((float) WIDTH, (float) HEIGHT));
            document.addPage(page);
            content = new PDPageContentStream(document, page);
            return new PdfPen();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    private void finish() throws IOException {
        if (content != null) content.close();
        content = null;
    }

    /** The file; nothing can be drawn afterwards. */
    public byte[] bytes() {
        try {
            finish();
            ByteArrayOutputStream out = new ByteArrayOutputStream();
            document.save(out);
            return out.toByteArray();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    @Override
    public void close() {
        try {
            document.close();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Something done with the page's stream. */
    private interface Act {
        void run() throws IOException;
    }

    private static void act(Act act) {
        try {
            act.run();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Draws on the present page; its y runs upward, ours downward. */
    private final class PdfPen implements Pen {

        private void stroke(String colour, double width, double... dash) throws IOException {
            content.setStrokingColor(java.awt.Color.decode(colour));
            content.setLineWidth((float) width);
            float[] on = new float[dash.length];
            for (int k = 0; k < dash.length; k++) on[k] = (float) dash[k];
            content.setLineDashPattern(on, 0);
        }

        private void fill(String colour, double opacity) throws IOException {
            content.setNonStrokingColor(java.awt.Color.decode(colour));
            PDExtendedGraphicsState state = new PDExtendedGraphicsState();
            state.setNonStrokingAlphaConstant((float) opacity);
            content.setGraphicsStateParameters(state);
        }

        private float y(double y) {
            return (float) (HEIGHT - y);
        }

        private void path(double[] x, double[] y, int count) throws IOException {
            content.moveTo((float) x[0], y(y[0]));
            for (int k = 1; k < count; k++) content.lineTo((float) x[k], y(y[k]));
        }

        @Override
        public void area(double[] x, double[] y, int count, String colour, double opacity) {
            act(() -> {
                fill(colour, opacity);
                path(x, y, count);
                content.closePath();
                content.fill();
            });
        }

        @Override
        public void line(double[] x, double[] y, int count, String colour, double width, double... dash) {
            act(() -> {
                stroke(colour, width, dash);
                path(x, y, count);
                content.stroke();
            });
        }

        @Override
        public void box(
                double x,
                double y,
                double w,
                double h,
                double radius,
                String fill,
                double opacity,
                String stroke,
                double width) {
            act(() -> {
                if (fill != null) {
                    fill(fill, opacity);
                    content.addRect((float) x, y(y + h), (float) w, (float) h);
                    content.fill();
                }
                if (stroke != null) {
                    stroke(stroke, width);
                    content.addRect((float) x, y(y + h), (float) w, (float) h);
                    content.stroke();
                }
            });
        }

        @Override
        public void disc(double x, double y, double radius, String colour) {
            double[] px = new double[24];
            double[] py = new double[24];
            for (int k = 0; k < 24; k++) {
                px[k] = x + radius * Math.cos(k * Math.PI / 12);
                py[k] = y + radius * Math.sin(k * Math.PI / 12);
            }
            area(px, py, 24, colour, 1);
        }

        @Override
        public void text(String text, double x, double y, double size, boolean heavy, String colour, Align align) {
            PDFont font = heavy ? bold : plain;
            String known = known(text, font);
            double left = switch (align) {
                case LEFT -> x;
                case CENTRE -> x - width(known, size, heavy) / 2;
                case RIGHT -> x - width(known, size, heavy);
            };
            act(() -> {
                fill(colour, 1);
                content.beginText();
                content.setFont(font, (float) size);
                content.newLineAtOffset((float) left, y(y));
                content.showText(known);
                content.endText();
            });
        }

        @Override
        public void clip(double x, double y, double w, double h) {
            act(() -> {
                content.saveGraphicsState();
                content.addRect((float) x, y(y + h), (float) w, (float) h);
                content.clip();
            });
        }

        @Override
        public void unclip() {
            act(() -> content.restoreGraphicsState());
        }

        @Override
        public double width(String text, double size, boolean heavy) {
            PDFont font = heavy ? bold : plain;
            try {
                return font.getStringWidth(known(text, font)) / 1000 * size;
            } catch (IOException e) {
                throw new UncheckedIOException(e);
            }
        }

        /** A letter that the font does not have becomes a question mark; a control character a blank. */
        private String known(String text, PDFont font) {
            StringBuilder out = new StringBuilder();
            text.codePoints().forEach(c -> {
                String letter = Character.isISOControl(c) ? " " : new String(Character.toChars(c));
                try {
                    font.encode(letter);
                    out.append(letter);
                } catch (IllegalArgumentException | IOException e) {
                    out.append('?');
                }
            });
            return out.toString();
        }
    }
}
