package org.hazewright.cli;

import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;

/**
 * A person's wish to end long work with the best so far (Ctrl-C, or a terminate signal).
 *
 * <p>At a terminal a signal starts the shutdown of the program; while a command listens, the shutdown waits for it to print and
 * write what it has, at most {@value #PATIENCE_S} s, and then ends with the command's own status. A command that does not listen
 * is ended at once.
 */
final class Interruption {
    private static final int PATIENCE_S = 60;

    private final CountDownLatch finished = new CountDownLatch(1);
    private volatile boolean listening;
    private volatile boolean asked;
    private volatile int status;

    /** One that answers to the signals of this process. */
    static Interruption atTerminal() {
        Interruption i = new Interruption();
        Runtime.getRuntime().addShutdownHook(new Thread(i::shutDown, "end with the best so far"));
        return i;
    }

    private void shutDown() {
        if (!listening || finished.getCount() == 0) return;
        ask();
        try {
            if (finished.await(PATIENCE_S, TimeUnit.SECONDS))
                Runtime.getRuntime().halt(status);
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        }
    }

    void ask() {
        asked = true;
    }

    boolean asked() {
        return asked;
    }

    /** From here on the work asks {@link #asked} now and then. */
    void listen() {
        listening = true;
    }

    /** All is printed and written. */
    void finished(int withStatus) {
        status = withStatus;
        finished.countDown();
    }
}
