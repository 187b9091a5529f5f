package org.hazewright.desk;

import java.awt.image.BufferedImage;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.nio.file.Path;
import java.util.Optional;
import javafx.scene.SnapshotParameters;
import javafx.scene.canvas.Canvas;
import javafx.scene.image.WritableImage;
import javafx.scene.paint.Color;
import javafx.scene.transform.Transform;
import javax.imageio.ImageIO;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Notice;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.pen.CanvasPen;
import org.hazewright.desk.pen.SvgPen;
import org.hazewright.desk.spectra.SpectraPlace;
import org.hazewright.desk.spectra.SpectraPlot;
import org.hazewright.files.SafeFile;
import org.hazewright.files.WriteFailure;

/** The spectra as a picture file: PNG at twice its size in px, or SVG. Always in the light colours, for paper and reports. */
final class Pictures {
    private static final double WIDTH = 900;
    private static final double HEIGHT = 720;
    private static final double EM = 14;

    private final Desk desk;
    private final Chooser chooser;

    Pictures(Desk desk, Look look, Chooser chooser) {
        this.desk = desk;
        this.chooser = chooser;
    }

    void save(SpectraPlace spectra) {
        if (desk.edits().now() == null) return;
        Optional<Path> file =
                chooser.save("Save picture", desk.edits().now().name() + "-spectra.png", "Pictures", ".png", ".svg");
        file.ifPresent(f -> write(f, spectra.picture(Palette.LIGHT, WIDTH, HEIGHT, EM)));
    }

    void write(Path file, SpectraPlot plot) {
        try {
            if (file.toString().endsWith(".svg")) {
                SvgPen pen = new SvgPen(WIDTH, HEIGHT);
                plot.draw(pen);
                SafeFile.write(
                        file,
                        pen.picture(desk.edits().now().title() + ": " + plot.inWords()),
                        SafeFile.Overwrite.REPLACE);
            } else {
                Path png = file.toString().endsWith(".png") ? file : file.resolveSibling(file.getFileName() + ".png");
                SafeFile.write(png, png(plot), SafeFile.Overwrite.REPLACE);
            }
            desk.notices().tell(Notice.told("picture", "Saved: " + file.getFileName() + "."));
        } catch (WriteFailure failure) {
            desk.notices().tell(Notice.wrong("picture", failure.getMessage()));
        }
    }

    private static byte[] png(SpectraPlot plot) {
        Canvas canvas = new Canvas(WIDTH, HEIGHT);
        plot.draw(new CanvasPen(canvas.getGraphicsContext2D()));
        SnapshotParameters twice = new SnapshotParameters();
        twice.setTransform(Transform.scale(2, 2));
        twice.setFill(Color.web(Palette.LIGHT.milk()));
        return bytes(canvas.snapshot(twice, null));
    }

    /** A picture as PNG. */
    static byte[] bytes(WritableImage image) {
        int w = (int) image.getWidth();
        int h = (int) image.getHeight();
        BufferedImage copy = new BufferedImage(w, h, BufferedImage.TYPE_INT_ARGB);
        int[] row = new int[w];
        var reader = image.getPixelReader();
        for (int y = 0; y < h; y++) {
            reader.getPixels(0, y, w, 1, javafx.scene.image.PixelFormat.getIntArgbInstance(), row, 0, w);
            copy.setRGB(0, y, w, 1, row, 0, w);
        }
        try {
            ByteArrayOutputStream out = new ByteArrayOutputStream();
            ImageIO.write(copy, "png", out);
            return out.toByteArray();
        } catch (IOException e) {
            throw new java.io.UncheckedIOException(e);
        }
    }
}
