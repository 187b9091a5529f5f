package org.hazewright.picture;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.image.BufferedImage;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.Locale;
import java.util.function.Consumer;
import javax.imageio.ImageIO;
import org.hazewright.optics.Refusal;
import org.jfree.svg.SVGGraphics2D;

/** Paper for a picture: the same strokes as PNG (two pixels a point) or as SVG, without a screen. */
final class Canvas {
    private Canvas() {}

    /** The picture as bytes, in the format that the file's name ends with: .png or .svg. */
    static byte[] draw(String fileName, int width, int height, Consumer<Graphics2D> picture) {
        String name = fileName.toLowerCase(Locale.ROOT);
        if (name.endsWith(".svg")) {
            SVGGraphics2D g = new SVGGraphics2D(width, height);
            prepare(g, width, height);
            picture.accept(g);
            return g.getSVGDocument().getBytes(StandardCharsets.UTF_8);
        }
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
