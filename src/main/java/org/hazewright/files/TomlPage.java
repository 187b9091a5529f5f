package org.hazewright.files;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.function.Supplier;
import org.hazewright.shelf.Nearest;

/**
 * One table of a TOML file, read by key: each value typed, each complaint with file, line and column.
 *
 * <p>A key that is asked for and not there is refused, unless the method says what it gives instead. Numbers are finite. Text is
 * not blank and holds no control characters. {@link #refuseUnknown} is what makes a mistyped key an error.
 */
final class TomlPage {
    /** A value (text, Long, Double, Boolean, date, list of entries, page) and where it stands. */
    record Entry(Object value, Place at) {}

    private final String title;
    private final Place at;
    private final Map<String, Entry> entries;

    TomlPage(String title, Place at, Map<String, Entry> entries) {
        this.title = title;
        this.at = at;
        this.entries = entries;
    }

    static TomlPage read(Path file) {
        return TomlTree.parse(TextFile.read(file));
    }

    static TomlPage of(TextFile file) {
        return TomlTree.parse(file);
    }

    /** Where the table begins. */
    Place at() {
        return at;
    }

    /** Where a key stands, or where the table begins when it has no such key. */
    Place at(String key) {
        Entry e = entries.get(key);
        return e == null ? at : e.at();
    }

    boolean has(String key) {
        return entries.containsKey(key);
    }

    String title() {
        return title;
    }

    Map<String, Entry> entries() {
        return entries;
    }

    Set<String> keys() {
        return entries.keySet();
    }

    FileRefusal refusal(String key, String complaint) {
        return at(key).refusal(complaint);
    }

    /** Refuses any key but these, with the nearest of them as a suggestion. */
    void refuseUnknown(String... known) {
        refuseUnknown(Arrays.asList(known));
    }

    void refuseUnknown(Collection<String> known) {
        for (String key : entries.keySet())
            if (!known.contains(key))
                throw refusal(key, "The key " + key + where() + " is not known." + Meant.by(key, known));
    }

    /** Refuses a file that by its name is of another kind, or whose {@code format} is missing or not 1. */
    void requireFormat(FileKind kind) {
        kind.require(at);
        requireFormat();
    }

    /** Refuses a file whose {@code format} is missing or not 1. */
    void requireFormat() {
        if (!has("format")) throw at.refusal("The key format is missing; add format = 1 as the first line.");
        if (!Long.valueOf(1).equals(entries.get("format").value()))
            throw refusal(
                    "format",
                    "format is " + described(entries.get("format").value())
                            + "; this program reads format = 1. A newer version may be needed for this file.");
    }

    String text(String key) {
        Object value = required(key, "text in double quotes").value();
        if (!(value instanceof String s)) throw wrong(key, value, "text in double quotes");
        if (s.isBlank()) throw refusal(key, named(key) + " is empty; write something, or take the line out.");
        if (s.chars().anyMatch(c -> Character.isISOControl(c)))
            throw refusal(key, named(key) + " holds a line break or a control character; write it on one line.");
        return s.strip();
    }

    String text(String key, String otherwise) {
        return has(key) ? text(key) : otherwise;
    }

    Optional<String> maybeText(String key) {
        return has(key) ? Optional.of(text(key)) : Optional.empty();
    }

    /** A list of texts; empty when the key is not there. */
    List<String> texts(String key) {
        if (!has(key)) return List.of();
        List<String> texts = new ArrayList<>();
        for (Entry e : list(key, "a list of texts: [\"one\", \"two\"]")) {
            if (!(e.value() instanceof String s) || s.isBlank() || s.chars().anyMatch(c -> Character.isISOControl(c)))
                throw e.at().refusal("The list " + named(key) + " holds " + described(e.value())
                        + "; it takes texts in double quotes, each on one line.");
            texts.add(s.strip());
        }
        return texts;
    }

    /** One text, or a list of at least one. */
    List<String> textOrTexts(String key) {
        Object value =
                required(key, "text in double quotes, or a list of texts").value();
        if (!(value instanceof List<?>)) return List.of(text(key));
        List<String> texts = texts(key);
        if (texts.isEmpty()) throw refusal(key, "The list " + named(key) + " is empty; it needs at least one entry.");
        return texts;
    }

    double number(String key) {
        Entry e = required(key, "a number");
        return finite(e, named(key));
    }

    double number(String key, double otherwise) {
        return has(key) ? number(key) : otherwise;
    }

    OptionalDouble maybeNumber(String key) {
        return has(key) ? OptionalDouble.of(number(key)) : OptionalDouble.empty();
    }

    /** A number above 0. */
    double positive(String key) {
        double v = number(key);
        if (!(v > 0)) throw refusal(key, named(key) + " is " + plain(v) + "; it must be above 0.");
        return v;
    }

    double positive(String key, double otherwise) {
        return has(key) ? positive(key) : otherwise;
    }

    OptionalDouble maybePositive(String key) {
        return has(key) ? OptionalDouble.of(positive(key)) : OptionalDouble.empty();
    }

    /** A number, 0 or above. */
    double notNegative(String key) {
        double v = number(key);
        if (v < 0) throw refusal(key, named(key) + " is " + plain(v) + "; it must be 0 or above.");
        return v;
    }

    OptionalDouble maybeNotNegative(String key) {
        return has(key) ? OptionalDouble.of(notNegative(key)) : OptionalDouble.empty();
    }

    /** A number in the closed interval. */
    double within(String key, double low, double high) {
        double v = number(key);
        if (v < low || v > high)
            throw refusal(
                    key,
                    named(key) + " is " + plain(v) + "; it must lie between " + plain(low) + " and " + plain(high)
                            + ".");
        return v;
    }

    double within(String key, double low, double high, double otherwise) {
        return has(key) ? within(key, low, high) : otherwise;
    }

    /** A whole number in the closed interval. */
    int whole(String key, int low, int high, int otherwise) {
        if (!has(key)) return otherwise;
        double v = number(key);
        if (v != Math.rint(v) || v < low || v > high)
            throw refusal(
                    key,
                    named(key) + " is " + plain(v) + "; it must be a whole number between " + low + " and " + high
                            + ".");
        return (int) v;
    }

    double[] numbers(String key) {
        required(key, "a list of numbers: [690, 830]");
        List<Entry> items = list(key, "a list of numbers: [690, 830]");
        double[] numbers = new double[items.size()];
        for (int i = 0; i < numbers.length; i++)
            numbers[i] = finite(items.get(i), "Entry " + (i + 1) + " of " + named(key));
        return numbers;
    }

    /** Where an entry of a list stands. */
    Place at(String key, int index) {
        return entries.get(key).value() instanceof List<?> items && items.get(index) instanceof Entry e
                ? e.at()
                : at(key);
    }

    boolean flag(String key, boolean otherwise) {
        if (!has(key)) return otherwise;
        Object value = entries.get(key).value();
        if (value instanceof Boolean b) return b;
        throw wrong(key, value, "true or false, without quotes");
    }

    Optional<LocalDate> date(String key) {
        if (!has(key)) return Optional.empty();
        Object value = entries.get(key).value();
        if (value instanceof LocalDate d) return Optional.of(d);
        throw wrong(key, value, "a date without quotes: 2026-03-01");
    }

    /** One of the words of an enum, in lower case, with hyphens for its underscores. */
    <E extends Enum<E>> E word(String key, Class<E> words) {
        return wordOf(text(key), at(key), named(key), words);
    }

    /** A list of such words. */
    <E extends Enum<E>> List<E> words(String key, Class<E> words) {
        List<String> texts = textOrTexts(key);
        List<E> found = new ArrayList<>();
        for (int i = 0; i < texts.size(); i++) found.add(wordOf(texts.get(i), at(key, i), named(key), words));
        return found;
    }

    private static <E extends Enum<E>> E wordOf(String text, Place at, String what, Class<E> words) {
        Map<String, E> known = new LinkedHashMap<>();
        for (E e : words.getEnumConstants())
            known.put(e.name().toLowerCase(Locale.ROOT).replace('_', '-'), e);
        if (known.containsKey(text)) return known.get(text);
        throw at.refusal(choice(what, text, known.keySet()));
    }

    /** One of these words. */
    String oneOf(String key, String... words) {
        String text = text(key);
        if (Arrays.asList(words).contains(text)) return text;
        throw refusal(key, choice(named(key), text, Arrays.asList(words)));
    }

    private static String choice(String what, String found, Collection<String> known) {
        return what + " is \"" + found + "\"; it must be one of " + String.join(", ", known) + "."
                + Nearest.to(found, known)
                        .map(n -> " Perhaps \"" + n + "\" is meant.")
                        .orElse("");
    }

    Optional<TomlPage> table(String key) {
        if (!has(key)) return Optional.empty();
        Object value = entries.get(key).value();
        if (value instanceof TomlPage page) return Optional.of(page);
        throw wrong(key, value, "a table: a line [" + path(key) + "] and its keys below it");
    }

    TomlPage requireTable(String key) {
        if (!has(key)) throw at.refusal("The table [" + path(key) + "] is missing; add it with its keys.");
        return table(key).get();
    }

    /** An array of tables; empty when the key is not there. */
    List<TomlPage> tables(String key) {
        if (!has(key)) return List.of();
        String allowed = "a list of tables: a line [[" + path(key) + "]] before each, or [{key = 1}, {key = 2}]";
        List<TomlPage> pages = new ArrayList<>();
        for (Entry e : list(key, allowed)) {
            if (!(e.value() instanceof TomlPage page))
                throw e.at().refusal("The list " + named(key) + " holds " + described(e.value()) + "; it must be "
                        + allowed + ".");
            pages.add(page);
        }
        return pages;
    }

    /** What {@code maker} makes; a refusal of the domain gets the place of the key. */
    <T> T holding(String key, Supplier<T> maker) {
        return at(key).of(maker);
    }

    /** This page with its keys over those of another; pages under the keys in {@code merged} are laid over each other likewise. */
    TomlPage over(TomlPage below, Collection<String> merged) {
        Map<String, Entry> all = new LinkedHashMap<>(below.entries);
        for (Map.Entry<String, Entry> mine : entries.entrySet()) {
            Entry theirs = all.get(mine.getKey());
            if (merged.contains(mine.getKey())
                    && theirs != null
                    && theirs.value() instanceof TomlPage under
                    && mine.getValue().value() instanceof TomlPage top)
                all.put(mine.getKey(), new Entry(top.over(under, Set.of()), top.at));
            else all.put(mine.getKey(), mine.getValue());
        }
        return new TomlPage(title, at, all);
    }

    /** This page with a text under a key, which stands at {@code place}. */
    TomlPage withText(String key, String text, Place place) {
        Map<String, Entry> all = new LinkedHashMap<>(entries);
        all.put(key, new Entry(text, place));
        return new TomlPage(title, at, all);
    }

    /** This page without some keys. */
    TomlPage without(String... keys) {
        Map<String, Entry> rest = new LinkedHashMap<>(entries);
        for (String key : keys) rest.remove(key);
        return new TomlPage(title, at, rest);
    }

    private List<Entry> list(String key, String allowed) {
        Object value = entries.get(key).value();
        if (!(value instanceof List<?> items)) throw wrong(key, value, allowed);
        return items.stream().map(Entry.class::cast).toList();
    }

    private Entry required(String key, String allowed) {
        Entry e = entries.get(key);
        if (e == null) throw at.refusal("The key " + key + where() + " is missing; it must be " + allowed + ".");
        return e;
    }

    private static double finite(Entry e, String what) {
        if (!(e.value() instanceof Number n))
            throw e.at().refusal(what + " is " + described(e.value()) + "; it must be a number"
                    + (e.value() instanceof String ? " without quotes, with a decimal point." : "."));
        double v = n.doubleValue();
        if (!Double.isFinite(v)) throw e.at().refusal(what + " is " + v + "; it must be a finite number.");
        return v;
    }

    private FileRefusal wrong(String key, Object value, String allowed) {
        return refusal(key, named(key) + " is " + described(value) + "; it must be " + allowed + ".");
    }

    private String where() {
        return title.isEmpty() ? "" : " in [" + title + "]";
    }

    private String named(String key) {
        return title.isEmpty() ? key : "[" + title + "] " + key;
    }

    private String path(String key) {
        return title.isEmpty() ? key : title + "." + key;
    }

    static String plain(double v) {
        return v == Math.rint(v) && Math.abs(v) < 1e15 ? Long.toString((long) v) : Double.toString(v);
    }

    private static String described(Object value) {
        if (value instanceof String s) return "the text \"" + (s.length() > 60 ? s.substring(0, 60) + "…" : s) + "\"";
        if (value instanceof TomlPage) return "a table";
        if (value instanceof List<?>) return "a list";
        if (value instanceof Boolean || value instanceof Long) return value.toString();
        if (value instanceof Double d) return plain(d);
        return "the date or time " + value;
    }
}
