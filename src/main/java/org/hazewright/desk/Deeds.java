package org.hazewright.desk;

import java.nio.file.Path;

/** What a person can set going from anywhere in the window. */
interface Deeds {
    void open();

    void open(Path file);

    void begin();

    void save();

    void saveAs();

    void saveSheet();

    void savePicture();

    void print();

    void copyGrams();

    void copyTargets();

    void balance();

    void shelf();

    void logbook();

    void dark(boolean yes);

    void keys();
}
