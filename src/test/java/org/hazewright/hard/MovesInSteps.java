package org.hazewright.hard;

import java.io.IOException;
import java.lang.reflect.InvocationTargetException;
import java.lang.reflect.Proxy;
import java.net.URI;
import java.nio.channels.FileChannel;
import java.nio.channels.SeekableByteChannel;
import java.nio.file.AccessMode;
import java.nio.file.AtomicMoveNotSupportedException;
import java.nio.file.CopyOption;
import java.nio.file.DirectoryStream;
import java.nio.file.FileStore;
import java.nio.file.FileSystem;
import java.nio.file.FileSystemException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.OpenOption;
import java.nio.file.Path;
import java.nio.file.PathMatcher;
import java.nio.file.StandardCopyOption;
import java.nio.file.WatchService;
import java.nio.file.attribute.BasicFileAttributes;
import java.nio.file.attribute.FileAttribute;
import java.nio.file.attribute.FileAttributeView;
import java.nio.file.attribute.UserPrincipalLookupService;
import java.nio.file.spi.FileSystemProvider;
import java.util.Arrays;
import java.util.Iterator;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * A file system over another one that cannot move a file in one step, as some network drives: an atomic move is refused, and a plain one
 * over a file that exists deletes that one first. {@link #breakMoves} lets the second step of each fail, as on a full disk.
 */
final class MovesInSteps extends FileSystem {
    private final FileSystem under;
    private final Provider provider = new Provider();
    private boolean broken;
    private int asked;

    MovesInSteps(FileSystem under) {
        this.under = under;
    }

    void breakMoves(boolean broken) {
        this.broken = broken;
    }

    /** How often a move in one step was asked for. */
    int asked() {
        return asked;
    }

    private Path over(Path path) {
        if (path == null) return null;
        return (Path) Proxy.newProxyInstance(
                MovesInSteps.class.getClassLoader(), new Class<?>[] {Path.class, Over.class}, (self, method, args) -> {
                    if (method.getDeclaringClass() == Over.class) return path;
                    if (method.getName().equals("getFileSystem")) return this;
                    if (args != null)
                        args = Arrays.stream(args)
                                .map(a -> a instanceof Over o ? o.path() : a)
                                .toArray();
                    try {
                        Object result = method.invoke(path, args);
                        return result instanceof Path p ? over(p) : result;
                    } catch (InvocationTargetException e) {
                        throw e.getCause();
                    }
                });
    }

    /** A path of this file system, for the one beneath. */
    private interface Over {
        Path path();
    }

    private static Path under(Path path) {
        return ((Over) path).path();
    }

    @Override
    public Path getPath(String first, String... more) {
        return over(under.getPath(first, more));
    }

    @Override
    public FileSystemProvider provider() {
        return provider;
    }

    @Override
    public void close() throws IOException {
        under.close();
    }

    @Override
    public boolean isOpen() {
        return under.isOpen();
    }

    @Override
    public boolean isReadOnly() {
        return under.isReadOnly();
    }

    @Override
    public String getSeparator() {
        return under.getSeparator();
    }

    @Override
    public Iterable<Path> getRootDirectories() {
        throw new UnsupportedOperationException();
    }

    @Override
    public Iterable<FileStore> getFileStores() {
        return under.getFileStores();
    }

    @Override
    public Set<String> supportedFileAttributeViews() {
        return under.supportedFileAttributeViews();
    }

    @Override
    public PathMatcher getPathMatcher(String pattern) {
        throw new UnsupportedOperationException();
    }

    @Override
    public UserPrincipalLookupService getUserPrincipalLookupService() {
        return under.getUserPrincipalLookupService();
    }

    @Override
    public WatchService newWatchService() throws IOException {
        return under.newWatchService();
    }

    private final class Provider extends FileSystemProvider {
        @Override
        public void move(Path from, Path to, CopyOption... options) throws IOException {
            List<CopyOption> how = List.of(options);
            if (how.contains(StandardCopyOption.ATOMIC_MOVE)) {
                asked++;
                throw new AtomicMoveNotSupportedException(from.toString(), to.toString(), "not on this drive");
            }
            if (how.contains(StandardCopyOption.REPLACE_EXISTING)) Files.deleteIfExists(under(to));
            if (broken) throw new FileSystemException(to.toString(), null, "No space left on device");
            Files.move(under(from), under(to));
        }

        @Override
        public String getScheme() {
            return "steps";
        }

        @Override
        public FileSystem newFileSystem(URI uri, Map<String, ?> env) {
            throw new UnsupportedOperationException();
        }

        @Override
        public FileSystem getFileSystem(URI uri) {
            return MovesInSteps.this;
        }

        @Override
        public Path getPath(URI uri) {
            throw new UnsupportedOperationException();
        }

        @Override
        public SeekableByteChannel newByteChannel(
                Path path, Set<? extends OpenOption> options, FileAttribute<?>... attributes) throws IOException {
            return Files.newByteChannel(under(path), options, attributes);
        }

        @Override
        public FileChannel newFileChannel(Path path, Set<? extends OpenOption> options, FileAttribute<?>... attributes)
                throws IOException {
            return FileChannel.open(under(path), options, attributes);
        }

        @Override
        @SuppressWarnings("StreamResourceLeak") // whoever asked for it closes it
        public DirectoryStream<Path> newDirectoryStream(Path folder, DirectoryStream.Filter<? super Path> filter)
                throws IOException {
            DirectoryStream<Path> all = Files.newDirectoryStream(under(folder), p -> filter.accept(over(p)));
            Iterator<Path> each = all.iterator();
            return new DirectoryStream<>() {
                @Override
                public Iterator<Path> iterator() {
                    return new Iterator<>() {
                        @Override
                        public boolean hasNext() {
                            return each.hasNext();
                        }

                        @Override
                        public Path next() {
                            return over(each.next());
                        }
                    };
                }

                @Override
                public void close() throws IOException {
                    all.close();
                }
            };
        }

        @Override
        public void createDirectory(Path folder, FileAttribute<?>... attributes) throws IOException {
            Files.createDirectory(under(folder), attributes);
        }

        @Override
        public void delete(Path path) throws IOException {
            Files.delete(under(path));
        }

        @Override
        public void copy(Path from, Path to, CopyOption... options) throws IOException {
            Files.copy(under(from), under(to), options);
        }

        @Override
        public boolean isSameFile(Path one, Path other) throws IOException {
            return Files.isSameFile(under(one), under(other));
        }

        @Override
        public boolean isHidden(Path path) throws IOException {
            return Files.isHidden(under(path));
        }

        @Override
        public FileStore getFileStore(Path path) throws IOException {
            return Files.getFileStore(under(path));
        }

        @Override
        public void checkAccess(Path path, AccessMode... modes) throws IOException {
            under(path).getFileSystem().provider().checkAccess(under(path), modes);
        }

        @Override
        public <V extends FileAttributeView> V getFileAttributeView(Path path, Class<V> type, LinkOption... options) {
            return Files.getFileAttributeView(under(path), type, options);
        }

        @Override
        public <A extends BasicFileAttributes> A readAttributes(Path path, Class<A> type, LinkOption... options)
                throws IOException {
            return Files.readAttributes(under(path), type, options);
        }

        @Override
        public Map<String, Object> readAttributes(Path path, String names, LinkOption... options) throws IOException {
            return Files.readAttributes(under(path), names, options);
        }

        @Override
        public void setAttribute(Path path, String name, Object value, LinkOption... options) throws IOException {
            Files.setAttribute(under(path), name, value, options);
        }
    }
}
