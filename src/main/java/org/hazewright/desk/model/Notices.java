package org.hazewright.desk.model;

import javafx.collections.FXCollections;
import javafx.collections.ObservableList;

/** What stands to be told, oldest first. */
public final class Notices {
    private final ObservableList<Notice> all = FXCollections.observableArrayList();

    public ObservableList<Notice> all() {
        return all;
    }

    public void tell(Notice notice) {
        all.removeIf(n -> n.strand().equals(notice.strand()));
        all.add(notice);
    }

    public void putAway(Notice notice) {
        all.remove(notice);
    }

    public void putAway(String strand) {
        all.removeIf(n -> n.strand().equals(strand));
    }
}
