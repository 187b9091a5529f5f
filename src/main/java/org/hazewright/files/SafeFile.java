package org.hazewright.files;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.AtomicMoveNotSupportedException;
import java.nio.file.DirectoryIteratorException;
import java.nio.file.DirectoryStream;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.FileSystemException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.NoSuchFileException;
import java.nio.file.NotDirectoryException;
import java.nio.file.Path;
import java.nio.file.ReadOnlyFileSystemException;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.PosixFileAttributeView;
import java.time.Duration;
import java.time.Instant;
import java.util.Arrays;
import java.util.Locale;
import java.util.concurrent.ThreadLocalRandom;

/**
 * Writes a file so that at any moment either the old one or the whole new one is there: a temporary file beside the target,
 * synced, then moved over it.
 *
 * <p>A folder that is missing is made. A link is followed and kept. A target that is a folder, a device or write-protected is
 * left alone, as is everything else when a {@link WriteFailure} is thrown. What a killed program left of the same target is swept
 * ten minutes later, with the next write; a temporary file that somebody else takes away is written anew.
 *
 * <p>Where a drive cannot move a file over another in one step, the old one goes first; should the new one then not come, it is kept
 * beside the place under its temporary name, and the failure says so.
 */
public final class SafeFile {
    private static final Duration LEFT_BEHIND = Duration.ofMinutes(10);

    /** How often a write begins anew when its temporary file was taken away. */
    private static final int TRIES = 5;

    private SafeFile() {}

    /** What happens to a file that is already there. */
    public enum Overwrite {
        /** It is replaced. */
        REPLACE,
        /**
         * It is replaced, and the previous version stays beside it, with {@code .previous} after its name; a file that holds the
         * same bytes already is left as it is.
         */
        KEEP_PREVIOUS,
        /** It stays, and the write fails. */
        NEVER
    }

    public static void write(Path target, String text, Overwrite policy) {
        write(target, text.getBytes(StandardCharsets.UTF_8), policy);
    }

    public static void write(Path target, byte[] bytes, Overwrite policy) {
        try {
            for (int attempt = 1; !written(target, bytes, policy, attempt == TRIES); attempt++) {}
        } catch (IOException | ReadOnlyFileSystemException | SecurityException e) {
            throw new WriteFailure(plain(target, e), e);
        }
    }

    /** False when the temporary file was taken away while it was written: swept by a program whose clock is ahead of ours. */
    private static boolean written(Path target, byte[] bytes, Overwrite policy, boolean last) throws IOException {
        Path temporary = null;
        try {
            Path end = checked(target, policy);
            if (policy == Overwrite.KEEP_PREVIOUS && holds(end, bytes)) return true;
            Path folder = end.toAbsolutePath().getParent();
            Files.createDirectories(folder);
            sweepLeftovers(folder, end.getFileName().toString());
            temporary = folder.resolve("." + end.getFileName() + "."
                    + Long.toString(ThreadLocalRandom.current().nextLong(1L << 40), 36) + ".part");
            boolean there = Files.exists(end);
            try {
                writeSynced(temporary, bytes);
                copyPermissions(end, temporary);
                if (policy == Overwrite.KEEP_PREVIOUS && Files.exists(end)) keepPrevious(end);
                try {
                    move(temporary, end, policy);
                } catch (IOException half) {
                    if (policy == Overwrite.NEVER || !there || Files.exists(end)) throw half;
                    // Only where a move is not one step: the old file went first, and the new one did not come.
                    Path kept = temporary;
                    temporary = null;
                    throw new WriteFailure(
                            plain(target, half) + " What was to be written is kept whole in " + kept + ".", half);
                }
            } catch (NoSuchFileException gone) {
                if (last || !Files.isDirectory(folder)) throw gone;
                return false;
            }
            temporary = null;
            syncFolder(folder);
            return true;
        } finally {
            deleteQuietly(temporary);
        }
    }

    private static Path checked(Path target, Overwrite policy) throws IOException {
        if (target.getFileName() == null || Files.isDirectory(target))
            throw new WriteFailure(target + " is a folder, so no file can be written there; name a file in it.");
        if (!Files.exists(target)) {
            if (Files.isSymbolicLink(target))
                throw new WriteFailure(target + " is a link that leads nowhere; delete it or name another file.");
            return target;
        }
        if (!Files.isRegularFile(target))
            throw new WriteFailure(target + " is a device or a pipe and not an ordinary file; name another file.");
        if (policy == Overwrite.NEVER)
            throw new WriteFailure(
                    target + " is already there and was not touched; move it away or choose another name.");
        if (!Files.isWritable(target))
            throw new WriteFailure(target + " is write-protected and was not touched; choose another name.");
        return target.toRealPath();
    }

    /** Temporary files of this target that a killed program left; a younger one may be another program's at work. */
    private static void sweepLeftovers(Path folder, String name) throws IOException {
        Instant old = Instant.now().minus(LEFT_BEHIND);
        try (DirectoryStream<Path> all = Files.newDirectoryStream(
                folder,
                p -> p.getFileName().toString().startsWith("." + name + ".")
                        && p.getFileName().toString().endsWith(".part"))) {
            for (Path p : all)
                if (Files.getLastModifiedTime(p, LinkOption.NOFOLLOW_LINKS)
                        .toInstant()
                        .isBefore(old)) deleteQuietly(p);
        } catch (DirectoryIteratorException | NoSuchFileException | AccessDeniedException e) {
            return; // a folder that may be written and not listed, or a file that another program swept
        }
    }

    private static void writeSynced(Path temporary, byte[] bytes) throws IOException {
        try (FileChannel out = FileChannel.open(temporary, StandardOpenOption.CREATE_NEW, StandardOpenOption.WRITE)) {
            ByteBuffer rest = ByteBuffer.wrap(bytes);
            while (rest.hasRemaining()) out.write(rest);
            out.force(true);
        }
    }

    private static void copyPermissions(Path from, Path to) throws IOException {
        if (!Files.exists(from)) return;
        PosixFileAttributeView view = Files.getFileAttributeView(to, PosixFileAttributeView.class);
        if (view != null) view.setPermissions(Files.getPosixFilePermissions(from));
    }

    private static boolean holds(Path end, byte[] bytes) throws IOException {
        return Files.exists(end) && Files.size(end) == bytes.length && Arrays.equals(Files.readAllBytes(end), bytes);
    }

    private static void keepPrevious(Path end) throws IOException {
        Path previous = end.resolveSibling(end.getFileName() + ".previous");
        Path copy = end.resolveSibling("." + end.getFileName() + ".previous.part");
        Files.copy(end, copy, StandardCopyOption.REPLACE_EXISTING, StandardCopyOption.COPY_ATTRIBUTES);
        move(copy, previous, Overwrite.REPLACE);
    }

    private static void move(Path from, Path to, Overwrite policy) throws IOException {
        if (policy == Overwrite.NEVER) {
            Files.move(from, to); // refuses an existing target
            return;
        }
        try {
            Files.move(from, to, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
        } catch (AtomicMoveNotSupportedException e) {
            Files.move(from, to, StandardCopyOption.REPLACE_EXISTING);
        }
    }

    /** Makes the move itself last; not every system lets a folder be synced, and then the move is only as safe as its own. */
    private static void syncFolder(Path folder) {
        try (FileChannel channel = FileChannel.open(folder, StandardOpenOption.READ)) {
            channel.force(true);
        } catch (IOException e) {
            return;
        }
    }

    private static void deleteQuietly(Path temporary) {
        if (temporary == null) return;
        try {
            Files.deleteIfExists(temporary);
        } catch (IOException e) {
            return; // the failure that led here is the one to report
        }
    }

    static String plain(Path target, Exception e) {
        String start = "The file " + target + " could not be written: ";
        String reason =
                e instanceof FileSystemException f && f.getReason() != null ? f.getReason() : "" + e.getMessage();
        String lower = reason.toLowerCase(Locale.ROOT);
        if (lower.contains("no space") || lower.contains("not enough space") || lower.contains("quota"))
            return start + "the disk is full. Make room, or write to another place.";
        if (lower.contains("used by another process"))
            return start + "another program has it open. Close it there and try again.";
        if (e instanceof ReadOnlyFileSystemException || lower.contains("read-only"))
            return start + "the disk is read-only. Write to another place.";
        if (e instanceof AccessDeniedException || e instanceof SecurityException)
            return start + "its folder does not let you write. Choose a folder of your own.";
        Path folder = target.toAbsolutePath().getParent();
        if (e instanceof FileAlreadyExistsException
                || e instanceof NotDirectoryException
                || lower.contains("not a directory"))
            return start
                    + "a part of its path, or the file itself, is already there as something else. Choose another name.";
        if (e instanceof NoSuchFileException && folder != null && !Files.isDirectory(folder, LinkOption.NOFOLLOW_LINKS))
            return start + "its folder is not there and could not be made. Choose another folder.";
        if (e instanceof NoSuchFileException)
            return start + "another program takes its temporary file away. Write to a folder of your own.";
        if (lower.contains("name too long")) return start + "its name is too long. Choose a shorter one.";
        return start + reason + ".";
    }
}
