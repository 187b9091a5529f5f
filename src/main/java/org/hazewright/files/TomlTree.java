package org.hazewright.files;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.regex.Pattern;
import org.tomlj.Toml;
import org.tomlj.TomlArray;
import org.tomlj.TomlParseError;
import org.tomlj.TomlParseResult;
import org.tomlj.TomlPosition;
import org.tomlj.TomlTable;
import org.tomlj.TomlVersion;

/**
 * TOML 1.0 text to {@link TomlPage}s: the only class that sees the parser.
 *
 * <p>Every value keeps its own place, so that a page made of two files still knows the line of each of its keys. A syntax error is
 * refused with the place of the first one and the count of the rest.
 */
final class TomlTree {
    private static final Pattern DECIMAL_COMMA = Pattern.compile("^[^\"'#]*[=\\[,]\\s*[+-]?\\d+,\\d+\\s*(#.*)?$");
    private static final Pattern BARE_WORD = Pattern.compile("^[^\"'#=]*=\\s*[\\p{L}_][^\"'=]*$");

    private TomlTree() {}

    /** Plain files by {@link PlainToml}, all others by the library, which is slow to start. */
    static TomlPage parse(TextFile file) {
        return PlainToml.parse(file).orElseGet(() -> byLibrary(file));
    }

    static TomlPage byLibrary(TextFile file) {
        TomlParseResult result;
        try {
            result = Toml.parse(file.text(), TomlVersion.V1_0_0);
        } catch (RuntimeException e) { // the parser's own faults must not reach a person as a stack trace
            throw Place.whole(file.path())
                    .refusal(
                            "The file cannot be read as TOML; compare it with one that the program wrote, or begin anew.");
        }
        if (result.hasErrors()) throw syntax(file, result.errors());
        return page(result, new Place(file.path(), 1, 1), "");
    }

    private static FileRefusal syntax(TextFile file, List<TomlParseError> errors) {
        TomlParseError first = errors.get(0);
        String[] lines = file.text().split("\n", -1);
        int n = first.position().line();
        String line = n >= 1 && n <= lines.length ? lines[n - 1].strip() : "";
        String hint = "";
        if (DECIMAL_COMMA.matcher(line).find()) hint = " Numbers take a decimal point: 0.5, not 0,5.";
        else if (BARE_WORD.matcher(line).find() && !line.matches(".*=\\s*(true|false|inf|nan)\\b.*"))
            hint = " Text stands in double quotes: key = \"text\".";
        String more = errors.size() == 1
                ? ""
                : errors.size() == 2 ? " One more error follows." : " " + (errors.size() - 1) + " more errors follow.";
        return new FileRefusal(
                file.path(),
                n,
                first.position().column(),
                "The TOML breaks off here: " + first.getMessage() + "." + hint + more);
    }

    private static TomlPage page(TomlTable table, Place at, String title) {
        Map<String, TomlPage.Entry> entries = new LinkedHashMap<>();
        for (Map.Entry<String, Object> e : table.entrySet()) {
            Place place = at(table.inputPositionOf(List.of(e.getKey())), at);
            entries.put(
                    e.getKey(), entry(e.getValue(), place, title.isEmpty() ? e.getKey() : title + "." + e.getKey()));
        }
        return new TomlPage(title, at, entries);
    }

    private static TomlPage.Entry entry(Object value, Place at, String title) {
        if (value instanceof TomlTable table) return new TomlPage.Entry(page(table, at, title), at);
        if (!(value instanceof TomlArray array)) return new TomlPage.Entry(value, at);
        List<TomlPage.Entry> items = new ArrayList<>(array.size());
        for (int i = 0; i < array.size(); i++) items.add(entry(array.get(i), at(array.inputPositionOf(i), at), title));
        return new TomlPage.Entry(List.copyOf(items), at);
    }

    private static Place at(TomlPosition position, Place otherwise) {
        return position == null ? otherwise : new Place(otherwise.path(), position.line(), position.column());
    }
}
