package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;

import java.io.ByteArrayInputStream;
import java.time.LocalDateTime;
import java.util.Arrays;
import java.util.Locale;
import java.util.TimeZone;
import java.util.zip.ZipEntry;
import java.util.zip.ZipInputStream;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.simple.SimpleLoggerContextFactory;
import org.hazewright.bench.Answer;
import org.junit.jupiter.api.Test;

/** Equal input gives equal bytes, at any time, in any zone and language; another recipe gives others. */
class SameBytesTest {

    @Test
    void equalAnswersGiveEqualBytes() {
        Answer a = Answers.gelatin();
        byte[] first = Filled.bytes(a);
        TimeZone zone = TimeZone.getDefault();
        Locale locale = Locale.getDefault();
        try {
            TimeZone.setDefault(TimeZone.getTimeZone("Pacific/Kiritimati"));
            Locale.setDefault(Locale.GERMANY);
            assertArrayEquals(first, Filled.bytes(Answers.gelatin()));
            Locale.setDefault(Locale.forLanguageTag("tr-TR"));
            assertArrayEquals(first, Filled.bytes(a));
        } finally {
            TimeZone.setDefault(zone);
            Locale.setDefault(locale);
        }
        assertFalse(Arrays.equals(first, Filled.bytes(Answers.bath())));
    }

    @Test
    void everyEntryCarriesTheSameFixedTime() throws Exception {
        try (ZipInputStream zip = new ZipInputStream(new ByteArrayInputStream(Filled.bytes(Answers.bath())))) {
            for (ZipEntry e = zip.getNextEntry(); e != null; e = zip.getNextEntry())
                assertEquals(LocalDateTime.of(2000, 1, 1, 0, 0), e.getTimeLocal(), e.getName());
        }
    }

    @Test
    void theWorkbookLibraryLogsToNobody() {
        assertInstanceOf(SimpleLoggerContextFactory.class, LogManager.getFactory());
    }
}
