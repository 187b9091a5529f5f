package org.hazewright.desk.pen;

import java.util.Locale;

/** Draws a picture in Scalable Vector Graphics 1.1; text stays text. */
public final class SvgPen implements Pen {
    private final double w;
    private final double h;
    private final StringBuilder body = new StringBuilder();
    private final StringBuilder definitions = new StringBuilder();
    private int clips;

    public SvgPen(double w, double h) {
        this.w = w;
        this.h = h;
    }

    /** The picture so far; {@code title} says what it shows. */
    public String picture(String title) {
        return "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n<svg xmlns=\"http://www.w3.org/2000/svg\" width=\"" + n(w)
                + "\" height=\"" + n(h) + "\" viewBox=\"0 0 " + n(w) + " " + n(h) + "\" role=\"img\">\n<title>"
                + escaped(title) + "</title>\n<defs>\n" + definitions + "</defs>\n" + body + "</svg>\n";
    }

    private static String n(double v) {
        String s = String.format(Locale.ROOT, "%.2f", v);
        return s.contains(".") ? s.replaceFirst("\\.?0+$", "") : s;
    }

    private static String escaped(String s) {
        return s.replace("&", "&amp;").replace("<", "&lt;").replace(">", "&gt;").replace("\"", "&quot;");
    }

    private static String points(double[] x, double[] y, int count) {
        StringBuilder s = new StringBuilder();
        for (int k = 0; k < count; k++)
            s.append(k == 0 ? "" : " ").append(n(x[k])).append(',').append(n(y[k]));
        return s.toString();
    }

    @Override
    public void area(double[] x, double[] y, int count, String colour, double opacity) {
        body.append("<polygon points=\"")
                .append(points(x, y, count))
                .append("\" fill=\"")
                .append(colour)
                .append("\" fill-opacity=\"")
                .append(n(opacity))
                .append("\"/>\n");
    }

    @Override
    public void line(double[] x, double[] y, int count, String colour, double width, double... dash) {
        body.append("<polyline points=\"")
                .append(points(x, y, count))
                .append("\" fill=\"none\" stroke=\"")
                .append(colour)
                .append("\" stroke-width=\"")
                .append(n(width))
                .append("\" stroke-linejoin=\"round\"");
        if (dash.length > 0) {
            body.append(" stroke-dasharray=\"");
            for (int k = 0; k < dash.length; k++) body.append(k == 0 ? "" : " ").append(n(dash[k]));
            body.append('"');
        }
        body.append("/>\n");
    }

    @Override
    public void box(
            double x,
            double y,
            double width,
            double height,
            double radius,
            String fill,
            double opacity,
            String stroke,
            double strokeWidth) {
        body.append(String.format(
                Locale.ROOT,
                "<rect x=\"%s\" y=\"%s\" width=\"%s\" height=\"%s\" rx=\"%s\" fill=\"%s\" fill-opacity=\"%s\"",
                n(x),
                n(y),
                n(Math.max(0, width)),
                n(Math.max(0, height)),
                n(radius),
                fill == null ? "none" : fill,
                n(opacity)));
        if (stroke != null)
            body.append(" stroke=\"")
                    .append(stroke)
                    .append("\" stroke-width=\"")
                    .append(n(strokeWidth))
                    .append('"');
        body.append("/>\n");
    }

    @Override
    public void disc(double x, double y, double radius, String colour) {
        body.append("<circle cx=\"")
                .append(n(x))
                .append("\" cy=\"")
                .append(n(y))
                .append("\" r=\"")
                .append(n(radius));
        body.append("\" fill=\"").append(colour).append("\"/>\n");
    }

    @Override
    public void text(String text, double x, double y, double size, boolean bold, String colour, Align align) {
        String anchor = switch (align) {
            case LEFT -> "start";
            case CENTRE -> "middle";
            case RIGHT -> "end";
        };
        body.append("<text x=\"")
                .append(n(x))
                .append("\" y=\"")
                .append(n(y))
                .append("\" font-size=\"")
                .append(n(size));
        body.append("\" font-family=\"sans-serif\"").append(bold ? " font-weight=\"bold\"" : "");
        body.append(" fill=\"")
                .append(colour)
                .append("\" text-anchor=\"")
                .append(anchor)
                .append("\">");
        body.append(escaped(text)).append("</text>\n");
    }

    @Override
    public void clip(double x, double y, double width, double height) {
        String id = "c" + ++clips;
        definitions
                .append("<clipPath id=\"")
                .append(id)
                .append("\"><rect x=\"")
                .append(n(x))
                .append("\" y=\"")
                .append(n(y));
        definitions
                .append("\" width=\"")
                .append(n(width))
                .append("\" height=\"")
                .append(n(height))
                .append("\"/></clipPath>\n");
        body.append("<g clip-path=\"url(#").append(id).append(")\">\n");
    }

    @Override
    public void unclip() {
        body.append("</g>\n");
    }

    /** An estimate: most letters of a sans-serif are a little over half as wide as high. */
    @Override
    public double width(String text, double size, boolean bold) {
        return text.length() * size * (bold ? 0.62 : 0.56);
    }
}
