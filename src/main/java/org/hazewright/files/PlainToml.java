package org.hazewright.files;

import java.time.DateTimeException;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * The plain part of TOML 1.0, read at once: what the shelf's files are written in.
 *
 * <p>Taken are bare keys, {@code [tables]} below tables that stand above them, arrays, inline tables, texts in double quotes without
 * backslashes, decimal numbers, true, false and days. Whatever else a text holds, an error above all, is not judged here: the answer
 * is empty, and {@link TomlTree} gives the text to the library, which knows all of TOML and words the errors. The library takes
 * some 200 ms of a cold process, most of it to learn its grammar anew, and it alone could keep the shipped shelf from being read in
 * 300 ms ({@code ShelfColdStart}). A test holds that both give the same pages, places included, wherever this gives one.
 *
 * <p>TOML 1.0.0, toml.io/en/v1.0.0.
 */
final class PlainToml {
    private static final int DEEPEST = 8;
    private static final int LONGEST_NUMBER = 30;
    private static final NotPlain NOT_PLAIN = new NotPlain();

    private final String text;
    private final String path;
    private int i;
    private int line = 1;
    private int lineStart;

    private PlainToml(TextFile file) {
        text = file.text();
        path = file.path();
    }

    static Optional<TomlPage> parse(TextFile file) {
        try {
            return Optional.of(new PlainToml(file).document().page());
        } catch (NotPlain somethingElse) {
            return Optional.empty();
        }
    }

    private static final class NotPlain extends RuntimeException {
        NotPlain() {
            super(null, null, false, false);
        }
    }

    /** A table under a header, while its keys still come in. */
    private record Table(String title, Place at, Map<String, Object> values, Map<String, Place> places) {
        static Table at(String title, Place at) {
            return new Table(title, at, new LinkedHashMap<>(), new LinkedHashMap<>());
        }

        void put(String key, Object value, Place at) {
            if (values.putIfAbsent(key, value) != null) throw NOT_PLAIN;
            places.put(key, at);
        }

        TomlPage page() {
            Map<String, TomlPage.Entry> entries = new LinkedHashMap<>();
            for (Map.Entry<String, Object> e : values.entrySet()) {
                Place place = places.get(e.getKey());
                Object value = e.getValue();
                if (value instanceof Table table) value = table.page();
                else if (value instanceof Tables tables) value = tables.entries();
                entries.put(e.getKey(), new TomlPage.Entry(value, place));
            }
            return new TomlPage(title, at, entries);
        }
    }

    /** The tables under one {@code [[header]]}. */
    private record Tables(List<Table> list) {
        List<TomlPage.Entry> entries() {
            List<TomlPage.Entry> entries = new ArrayList<>();
            for (Table t : list) entries.add(new TomlPage.Entry(t.page(), t.at()));
            return List.copyOf(entries);
        }
    }

    private Table document() {
        Table root = Table.at("", new Place(path, 1, 1));
        Table open = root;
        while (true) {
            blanks();
            if (i == text.length()) return root;
            char c = text.charAt(i);
            if (c == '[') open = header(root);
            else if (c != '\n' && c != '#') pair(open.title(), open::put, 0);
            endOfLine();
        }
    }

    private interface Home {
        void put(String key, Object value, Place at);
    }

    private Table header(Table root) {
        Place at = here();
        i++;
        boolean many = peek() == '[';
        if (many) i++;
        Table parent = root;
        blanks();
        String key = key();
        blanks();
        while (peek() == '.') {
            Object value = parent.values().get(key);
            if (value instanceof Table table) parent = table;
            else if (value instanceof Tables tables)
                parent = tables.list().get(tables.list().size() - 1);
            else throw NOT_PLAIN;
            i++;
            blanks();
            key = key();
            blanks();
        }
        take(']');
        if (many) take(']');
        Table opened = Table.at(parent.title().isEmpty() ? key : parent.title() + "." + key, at);
        if (!many) parent.put(key, opened, at);
        else if (parent.values().get(key) instanceof Tables tables)
            tables.list().add(opened);
        else parent.put(key, new Tables(new ArrayList<>(List.of(opened))), at);
        return opened;
    }

    private void pair(String title, Home home, int depth) {
        Place at = here();
        String key = key();
        blanks();
        take('=');
        blanks();
        home.put(key, value(title.isEmpty() ? key : title + "." + key, at, depth), at);
    }

    private Object value(String title, Place keyAt, int depth) {
        if (depth > DEEPEST) throw NOT_PLAIN;
        return switch (peek()) {
            case '"' -> string();
            case '[' -> array(title, depth);
            case '{' -> inline(title, keyAt, depth);
            case 't' -> word("true", true);
            case 'f' -> word("false", false);
            default -> number();
        };
    }

    private Object word(String word, Object value) {
        if (!text.startsWith(word, i)) throw NOT_PLAIN;
        i += word.length();
        return value;
    }

    private String string() {
        int from = ++i;
        while (peek() != '"') {
            char c = text.charAt(i);
            if (c == '\\' || control(c) || Character.isSurrogate(c)) throw NOT_PLAIN;
            i++;
        }
        String string = text.substring(from, i++);
        if (string.isEmpty() && i < text.length() && text.charAt(i) == '"') throw NOT_PLAIN;
        return string;
    }

    private List<TomlPage.Entry> array(String title, int depth) {
        List<TomlPage.Entry> items = new ArrayList<>();
        i++;
        while (true) {
            blankLines();
            if (peek() == ']') break;
            Place at = here();
            items.add(new TomlPage.Entry(value(title, at, depth + 1), at));
            blankLines();
            if (peek() == ']') break;
            take(',');
        }
        i++;
        return List.copyOf(items);
    }

    private TomlPage inline(String title, Place at, int depth) {
        Map<String, TomlPage.Entry> entries = new LinkedHashMap<>();
        Home home = (key, value, place) -> {
            if (entries.putIfAbsent(key, new TomlPage.Entry(value, place)) != null) throw NOT_PLAIN;
        };
        i++;
        blanks();
        if (peek() != '}') {
            pair(title, home, depth + 1);
            blanks();
            while (peek() == ',') {
                i++;
                blanks();
                pair(title, home, depth + 1);
                blanks();
            }
        }
        take('}');
        return new TomlPage(title, at, entries);
    }

    /** A number or a day; what looks like either and is not, is not plain. */
    private Object number() {
        int from = i;
        while (i < text.length() && "+-.eE0123456789".indexOf(text.charAt(i)) >= 0) i++;
        String s = text.substring(from, i);
        if (s.length() > LONGEST_NUMBER) throw NOT_PLAIN;
        if (s.length() == 10 && s.charAt(4) == '-' && s.charAt(7) == '-') return day(s);
        int digits = s.startsWith("+") || s.startsWith("-") ? 1 : 0;
        int end = digits(s, digits);
        if (end == digits || end - digits > 1 && s.charAt(digits) == '0') throw NOT_PLAIN;
        if (end == s.length()) {
            if (end - digits > 18) throw NOT_PLAIN;
            return Long.valueOf(s);
        }
        if (s.charAt(end) == '.') {
            int fraction = end + 1;
            end = digits(s, fraction);
            if (end == fraction) throw NOT_PLAIN;
        }
        if (end < s.length() && (s.charAt(end) == 'e' || s.charAt(end) == 'E')) {
            int exponent = end + 1;
            if (exponent < s.length() && (s.charAt(exponent) == '+' || s.charAt(exponent) == '-')) exponent++;
            end = digits(s, exponent);
            if (end == exponent || end - exponent > 2) throw NOT_PLAIN; // beyond 99 it may not fit a double
        }
        if (end != s.length()) throw NOT_PLAIN;
        return Double.valueOf(s);
    }

    private LocalDate day(String s) {
        if (i < text.length() && " ,]}\n".indexOf(text.charAt(i)) < 0) throw NOT_PLAIN; // a time may follow
        if (text.startsWith(" ", i) && i + 1 < text.length() && Character.isDigit(text.charAt(i + 1))) throw NOT_PLAIN;
        if (digits(s, 0) != 4 || digits(s, 5) != 7 || digits(s, 8) != 10) throw NOT_PLAIN;
        try {
            return LocalDate.of(
                    Integer.parseInt(s.substring(0, 4)),
                    Integer.parseInt(s.substring(5, 7)),
                    Integer.parseInt(s.substring(8)));
        } catch (DateTimeException e) {
            throw NOT_PLAIN;
        }
    }

    private static int digits(String s, int from) {
        int end = from;
        while (end < s.length() && s.charAt(end) >= '0' && s.charAt(end) <= '9') end++;
        return end;
    }

    private String key() {
        int from = i;
        while (i < text.length() && bare(text.charAt(i))) i++;
        if (i == from) throw NOT_PLAIN;
        return text.substring(from, i);
    }

    private static boolean bare(char c) {
        return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c >= '0' && c <= '9' || c == '_' || c == '-';
    }

    private void endOfLine() {
        blanks();
        comment();
        if (i == text.length()) return;
        take('\n');
        newLine();
    }

    private void blankLines() {
        while (true) {
            blanks();
            comment();
            if (peek() != '\n') return;
            i++;
            newLine();
        }
    }

    private void newLine() {
        line++;
        lineStart = i;
    }

    private void comment() {
        if (i == text.length() || text.charAt(i) != '#') return;
        while (i < text.length() && text.charAt(i) != '\n') {
            char c = text.charAt(i++);
            if (control(c) || Character.isSurrogate(c)) throw NOT_PLAIN;
        }
    }

    private static boolean control(char c) {
        return c < ' ' && c != '\t' || c == 0x7F;
    }

    private void blanks() {
        while (i < text.length() && (text.charAt(i) == ' ' || text.charAt(i) == '\t')) i++;
    }

    private char peek() {
        if (i == text.length()) throw NOT_PLAIN;
        return text.charAt(i);
    }

    private void take(char c) {
        if (peek() != c) throw NOT_PLAIN;
        i++;
    }

    private Place here() {
        return new Place(path, line, i - lineStart + 1);
    }
}
