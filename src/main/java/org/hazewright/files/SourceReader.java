package org.hazewright.files;

import org.hazewright.shelf.Source;

/** The {@code [source]} table: basis, citation, and a note that is kept behind the citation. */
final class SourceReader {
    private SourceReader() {}

    static Source read(TomlPage table) {
        table.refuseUnknown("basis", "citation", "note");
        Source.Basis basis = table.word("basis", Source.Basis.class);
        String citation = table.text("citation", "");
        String note = table.text("note", "");
        Source source = table.at().of(() -> new Source(basis, citation));
        return note.isEmpty() ? source : new Source(basis, citation.isEmpty() ? note : citation + " " + note);
    }
}
