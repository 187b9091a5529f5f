package org.hazewright.desk.model;

import java.util.concurrent.Executor;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.function.BooleanSupplier;
import java.util.function.Consumer;
import java.util.function.DoubleConsumer;
import javafx.beans.property.ReadOnlyBooleanProperty;
import javafx.beans.property.ReadOnlyBooleanWrapper;
import javafx.beans.property.ReadOnlyDoubleProperty;
import javafx.beans.property.ReadOnlyDoubleWrapper;

/**
 * The one runner of everything that takes time: work is done off the interface thread and its result handed back on it.
 *
 * <p>Work is asked for in lanes. A lane does one job at a time and remembers only the newest request; what was waiting is dropped.
 * An {@link Haste#INTERRUPT} lane also stops the job that is running and never shows its result; an {@link Haste#FINISH} lane lets
 * it end and shows it, so that a picture keeps moving while requests stream in. A lane starts its next job only after the last result was
 * shown, so that the interface thread is never flooded.
 */
public final class Work implements AutoCloseable {
    /** What a newer request does to the job that is running. */
    public enum Haste {
        INTERRUPT,
        FINISH
    }

    /** A job: asks {@code stop} now and then, tells {@code progress} the share done. */
    public interface Job<T> {
        T run(BooleanSupplier stop, DoubleConsumer progress);
    }

    private final Executor workers;
    private final Executor ui;
    private final boolean waits;

    private Work(Executor workers, Executor ui, boolean waits) {
        this.workers = workers;
        this.ui = ui;
        this.waits = waits;
    }

    /** Runs on threads of its own; {@code ui} puts results on the interface thread. */
    public static Work threaded(Executor ui) {
        return new Work(
                Executors.newCachedThreadPool(r -> {
                    Thread t = new Thread(r, "desk work");
                    t.setDaemon(true);
                    return t;
                }),
                ui,
                true);
    }

    /** Runs everything at once on the thread that asks, without any wait: for tests. */
    public static Work sameThread() {
        return new Work(Runnable::run, Runnable::run, false);
    }

    public Lane lane(Haste haste) {
        return new Lane(haste);
    }

    @Override
    public void close() {
        if (workers instanceof ExecutorService service) service.shutdownNow();
    }

    private record Request<T>(long waitMs, Job<T> job, Consumer<? super T> done, Consumer<? super Throwable> failed) {}

    /** One kind of work. Its methods are called on the interface thread. */
    public final class Lane {
        private final Haste haste;
        private final ReadOnlyBooleanWrapper busy = new ReadOnlyBooleanWrapper(false);
        private final ReadOnlyDoubleWrapper progress = new ReadOnlyDoubleWrapper(0);
        private Request<?> waiting;
        private Ticket running;

        private Lane(Haste haste) {
            this.haste = haste;
        }

        private static final class Ticket {
            private volatile boolean stop;

            synchronized void stop() {
                stop = true;
                notifyAll();
            }

            synchronized void rest(long ms) throws InterruptedException {
                long end = System.nanoTime() + ms * 1_000_000;
                for (long left = ms; left > 0 && !stop; left = (end - System.nanoTime()) / 1_000_000) wait(left);
            }
        }

        public ReadOnlyBooleanProperty busyProperty() {
            return busy.getReadOnlyProperty();
        }

        /** Share done of the running job, 0 to 1. */
        public ReadOnlyDoubleProperty progressProperty() {
            return progress.getReadOnlyProperty();
        }

        public <T> void request(Job<T> job, Consumer<? super T> done, Consumer<? super Throwable> failed) {
            requestAfter(0, job, done, failed);
        }

        /** As {@link #request}, begun only when nothing newer was asked for in so many milliseconds. */
        public <T> void requestAfter(
                long waitMs, Job<T> job, Consumer<? super T> done, Consumer<? super Throwable> failed) {
            waiting = new Request<>(waits ? waitMs : 0, job, done, failed);
            busy.set(true);
            if (running == null) start();
            else if (haste == Haste.INTERRUPT) running.stop();
        }

        /** Drops what waits and stops what runs. */
        public void stop() {
            waiting = null;
            if (running != null) running.stop();
            else busy.set(false);
        }

        private void start() {
            Request<?> request = waiting;
            waiting = null;
            running = new Ticket();
            progress.set(0);
            launch(request, running);
        }

        private <T> void launch(Request<T> request, Ticket ticket) {
            workers.execute(() -> {
                T result = null;
                Throwable failure = null;
                try {
                    ticket.rest(request.waitMs());
                    if (!ticket.stop) result = request.job().run(() -> ticket.stop, share -> told(ticket, share));
                } catch (InterruptedException e) {
                    ticket.stop = true;
                } catch (RuntimeException | Error e) {
                    failure = e;
                }
                T found = result;
                Throwable thrown = failure;
                ui.execute(() -> finished(request, ticket, found, thrown));
            });
        }

        private void told(Ticket ticket, double share) {
            ui.execute(() -> {
                if (running == ticket && share >= progress.get() + 0.01) progress.set(share);
            });
        }

        private <T> void finished(Request<T> request, Ticket ticket, T result, Throwable failure) {
            running = null;
            try {
                if (!ticket.stop) {
                    if (failure == null) request.done().accept(result);
                    else request.failed().accept(failure);
                }
            } finally {
                if (running == null) {
                    if (waiting != null) start();
                    else busy.set(false);
                }
            }
        }
    }
}
