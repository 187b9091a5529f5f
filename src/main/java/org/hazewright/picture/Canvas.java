package org.hazewright.picture;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Dimension;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.image.BufferedImage;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.Locale;
import java.util.function.Consumer;
import javax.imageio.ImageIO;
import javax.xml.parsers.DocumentBuilderFactory;
import javax.xml.parsers.ParserConfigurationException;
import javax.xml.transform.TransformerException;
import javax.xml.transform.TransformerFactory;
import javax.xml.transform.dom.DOMSource;
import javax.xml.transform.stream.StreamResult;
import org.apache.batik.svggen.SVGGeneratorContext;
import org.apache.batik.svggen.SVGGraphics2D;
import org.apache.batik.util.SVGConstants;
import org.hazewright.optics.Refusal;
import org.w3c.dom.Document;
import org.w3c.dom.Element;

/** Paper for a picture: the same strokes as PNG (two pixels a point) or as SVG, without a screen. */
final class Canvas {
    private Canvas() {}

    /** The picture as bytes, in the format that the file's name ends with: .png or .svg. */
    static byte[] draw(String fileName, int width, int height, Consumer<Graphics2D> picture) {
        String name = fileName.toLowerCase(Locale.ROOT);
        if (name.endsWith(".svg")) return svg(width, height, picture);
        if (!name.endsWith(".png"))
            throw new Refusal("A picture is written as .png or .svg; \"" + fileName + "\" ends with neither.");
        BufferedImage image = new BufferedImage(2 * width, 2 * height, BufferedImage.TYPE_INT_RGB);
        Graphics2D g = image.createGraphics();
        g.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
        g.setRenderingHint(RenderingHints.KEY_TEXT_ANTIALIASING, RenderingHints.VALUE_TEXT_ANTIALIAS_ON);
        g.setRenderingHint(RenderingHints.KEY_STROKE_CONTROL, RenderingHints.VALUE_STROKE_PURE);
        g.scale(2, 2);
        prepare(g, width, height);
        picture.accept(g);
        g.dispose();
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        try {
            ImageIO.write(image, "png", out);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return out.toByteArray();
    }

    private static byte[] svg(int width, int height, Consumer<Graphics2D> picture) {
        SVGGeneratorContext how = SVGGeneratorContext.createDefault(emptyDocument());
        how.setComment("Drawn by Hazewright");
        SVGGraphics2D g = new SVGGraphics2D(how, false); // text stays text
        g.setSVGCanvasSize(new Dimension(width, height));
        prepare(g, width, height);
        picture.accept(g);
        Element root = g.getRoot();
        root.setAttributeNS(null, "viewBox", "0 0 " + width + " " + height); // so that it can be made larger
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        try {
            // Not by the library's own writer, which names a document type that a viewer may look for on the network.
            TransformerFactory.newDefaultInstance()
                    .newTransformer()
                    .transform(new DOMSource(root), new StreamResult(out));
        } catch (TransformerException e) {
            throw new IllegalStateException(e); // memory takes all
        }
        return out.toByteArray();
    }

    private static Document emptyDocument() {
        try {
            return DocumentBuilderFactory.newDefaultNSInstance()
                    .newDocumentBuilder()
                    .getDOMImplementation()
                    .createDocument(SVGConstants.SVG_NAMESPACE_URI, SVGConstants.SVG_SVG_TAG, null);
        } catch (ParserConfigurationException e) {
            throw new IllegalStateException(e); // every Java has it
        }
    }

    private static void prepare(Graphics2D g, int width, int height) {
        g.setColor(colour(Palette.MILK));
        g.fillRect(0, 0, width, height);
        g.setFont(new Font(Font.SANS_SERIF, Font.PLAIN, 12));
        g.setStroke(new BasicStroke(1));
    }

    static Color colour(String hex) {
        return new Color(Integer.parseInt(hex, 16));
    }

    static Color faint(String hex, int alpha) {
        Color c = colour(hex);
        return new Color(c.getRed(), c.getGreen(), c.getBlue(), alpha);
    }
}
