package org.hazewright.desk.model;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.LinkedBlockingQueue;
import java.util.concurrent.TimeUnit;
import java.util.function.BooleanSupplier;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;

/** The newest request wins; what it does to older ones depends on the lane. */
class WorkTest {
    private final BlockingQueue<Runnable> ui = new LinkedBlockingQueue<>();
    private final Work work = Work.threaded(ui::add);
    private final List<String> shown = new ArrayList<>();

    @AfterEach
    void close() {
        work.close();
    }

    /** Plays the interface thread until something holds. */
    private void until(BooleanSupplier holds) throws InterruptedException {
        while (!holds.getAsBoolean()) {
            Runnable next = ui.poll(20, TimeUnit.SECONDS);
            assertTrue(next != null, "nothing more comes to the interface thread");
            next.run();
        }
    }

    private void ask(Work.Lane lane, String name, CountDownLatch go) {
        lane.request(
                (stop, progress) -> {
                    try {
                        while (!go.await(1, TimeUnit.MILLISECONDS)) if (stop.getAsBoolean()) return name + " stopped";
                    } catch (InterruptedException e) {
                        Thread.currentThread().interrupt();
                    }
                    return name;
                },
                shown::add,
                failure -> shown.add("failed " + failure.getMessage()));
    }

    @Test
    void anInterruptLaneShowsOnlyTheNewest() throws InterruptedException {
        Work.Lane lane = work.lane(Work.Haste.INTERRUPT);
        CountDownLatch never = new CountDownLatch(1);
        CountDownLatch now = new CountDownLatch(0);
        ask(lane, "first", never);
        ask(lane, "second", never);
        ask(lane, "third", now);
        assertTrue(lane.busyProperty().get());
        until(() -> !lane.busyProperty().get());
        assertEquals(List.of("third"), shown);
    }

    @Test
    void aFinishLaneShowsWhatRunsAndThenTheNewest() throws InterruptedException {
        Work.Lane lane = work.lane(Work.Haste.FINISH);
        CountDownLatch go = new CountDownLatch(1);
        ask(lane, "first", go);
        ask(lane, "second", go);
        ask(lane, "third", go);
        go.countDown();
        until(() -> !lane.busyProperty().get());
        assertEquals(List.of("first", "third"), shown);
    }

    @Test
    void whatFailsIsToldAndTheLaneGoesOn() throws InterruptedException {
        Work.Lane lane = work.lane(Work.Haste.FINISH);
        lane.request(
                (stop, progress) -> {
                    throw new IllegalStateException("no");
                },
                x -> shown.add("done"),
                f -> shown.add(f.getMessage()));
        until(() -> !lane.busyProperty().get());
        ask(lane, "next", new CountDownLatch(0));
        until(() -> !lane.busyProperty().get());
        assertEquals(List.of("no", "next"), shown);
    }

    @Test
    void aStoppedLaneShowsNothing() throws InterruptedException {
        Work.Lane lane = work.lane(Work.Haste.INTERRUPT);
        ask(lane, "first", new CountDownLatch(1));
        lane.stop();
        until(() -> !lane.busyProperty().get());
        assertTrue(shown.isEmpty());
    }

    @Test
    void waitingIsCutShortByANewerRequest() throws InterruptedException {
        Work.Lane lane = work.lane(Work.Haste.INTERRUPT);
        lane.requestAfter(3_600_000, (stop, progress) -> "in an hour", shown::add, f -> {});
        ask(lane, "now", new CountDownLatch(0));
        until(() -> !lane.busyProperty().get());
        assertEquals(List.of("now"), shown);
    }

    @Test
    void theSameThreadRunnerShowsAtOnce() {
        Work.Lane lane = Work.sameThread().lane(Work.Haste.INTERRUPT);
        lane.requestAfter(3_600_000, (stop, progress) -> "at once", shown::add, f -> {});
        assertEquals(List.of("at once"), shown);
        assertFalse(lane.busyProperty().get());
    }
}
