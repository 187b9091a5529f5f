package org.hazewright.desk.parts;

import java.io.File;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Optional;
import javafx.stage.DirectoryChooser;
import javafx.stage.FileChooser;
import javafx.stage.Window;

/** Asks with the dialogs of the system. */
public final class SystemChooser implements Chooser {
    private final Window owner;
    private File last;

    public SystemChooser(Window owner) {
        this.owner = owner;
    }

    private FileChooser chooser(String title, String kind, String... endings) {
        FileChooser c = new FileChooser();
        c.setTitle(title);
        if (last != null && last.isDirectory()) c.setInitialDirectory(last);
        c.getExtensionFilters()
                .add(new FileChooser.ExtensionFilter(
                        kind, Arrays.stream(endings).map(e -> "*" + e).toList()));
        return c;
    }

    private Optional<Path> kept(File file) {
        if (file == null) return Optional.empty();
        last = file.getParentFile();
        return Optional.of(file.toPath());
    }

    @Override
    public Optional<Path> open(String title, String kind, String... endings) {
        return kept(chooser(title, kind, endings).showOpenDialog(owner));
    }

    @Override
    public Optional<Path> save(String title, String name, String kind, String... endings) {
        FileChooser c = chooser(title, kind, endings);
        c.setInitialFileName(name);
        return kept(c.showSaveDialog(owner));
    }

    @Override
    public Optional<Path> folder(String title) {
        DirectoryChooser c = new DirectoryChooser();
        c.setTitle(title);
        if (last != null && last.isDirectory()) c.setInitialDirectory(last);
        return Optional.ofNullable(c.showDialog(owner)).map(File::toPath);
    }
}
