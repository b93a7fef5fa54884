#include "core/record/byte_source.h"

#include <algorithm>
#include <cerrno>
#include <cstring>
#include <vector>

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

namespace strikeplate {
namespace {

class MemorySource final : public ByteSource {
 public:
  explicit MemorySource(std::span<const std::byte> bytes) : bytes_(bytes) {}

  [[nodiscard]] std::uint64_t size() const override { return bytes_.size(); }

  [[nodiscard]] std::size_t read(std::uint64_t offset, std::span<std::byte> into) const override {
    if (offset >= bytes_.size() || into.empty()) {
      return 0;
    }
    const std::size_t count = std::min<std::uint64_t>(into.size(), bytes_.size() - offset);
    std::memcpy(into.data(), bytes_.data() + offset, count);
    return count;
  }

 private:
  std::span<const std::byte> bytes_;
};

// Reads a little ahead, so that many small pieces cost few calls of the system, and large pieces straight into their
// places. A file that shrinks meanwhile is a short read, not a crash as it would be in a memory map.
class FileSource final : public ByteSource {
 public:
  FileSource(int descriptor, std::uint64_t size)
      : descriptor_(descriptor), size_(size), window_(std::clamp<std::uint64_t>(size / 8, 4096, 262144)) {}
  ~FileSource() override { ::close(descriptor_); }
  FileSource(const FileSource&) = delete;
  FileSource& operator=(const FileSource&) = delete;

  [[nodiscard]] std::uint64_t size() const override { return size_; }

  [[nodiscard]] std::size_t read(std::uint64_t offset, std::span<std::byte> into) const override {
    if (into.size() > window_ / 2) {
      return readFile(offset, into);
    }
    const bool there = offset >= aheadAt_ && offset + into.size() <= aheadAt_ + ahead_.size();
    if (!there) {
      ahead_.resize(window_);
      ahead_.resize(readFile(offset, ahead_));
      aheadAt_ = offset;
    }
    const std::size_t count = std::min<std::uint64_t>(into.size(), ahead_.size() - (offset - aheadAt_));
    if (count > 0) {
      std::memcpy(into.data(), ahead_.data() + (offset - aheadAt_), count);
    }
    return count;
  }

 private:
  std::size_t readFile(std::uint64_t offset, std::span<std::byte> into) const {
    std::size_t done = 0;
    while (done < into.size()) {
      const ssize_t got =
          ::pread(descriptor_, into.data() + done, into.size() - done, static_cast<off_t>(offset + done));
      if (got < 0 && errno == EINTR) {
        continue;
      }
      if (got <= 0) {
        break;
      }
      done += static_cast<std::size_t>(got);
    }
    return done;
  }

  int descriptor_;
  std::uint64_t size_;
  std::size_t window_;
  mutable std::vector<std::byte> ahead_;  // bytes of the file from aheadAt_ on
  mutable std::uint64_t aheadAt_ = 0;
};

std::string whyNotOpened(const std::string& path, int error) {
  switch (error) {
    case ENOENT:
    case ENOTDIR:
      return path + " does not exist; check its name and folder.";
    case EACCES:
    case EPERM:
      return path + " may not be read by you; ask its owner for the right to read it.";
    default:
      return path + " cannot be opened (" + std::strerror(error) + "); check the file and its disk.";
  }
}

}  // namespace

std::unique_ptr<ByteSource> bytesInMemory(std::span<const std::byte> bytes) {
  return std::make_unique<MemorySource>(bytes);
}

Result<std::unique_ptr<ByteSource>> openBytes(const std::string& path) {
  // Without O_NONBLOCK a named pipe would wait for a writer for ever.
  const int descriptor = ::open(path.c_str(), O_RDONLY | O_CLOEXEC | O_NONBLOCK);
  if (descriptor < 0) {
    return Failure{whyNotOpened(path, errno)};
  }
  struct stat about {};
  if (::fstat(descriptor, &about) != 0) {
    const int error = errno;
    ::close(descriptor);
    return Failure{whyNotOpened(path, error)};
  }
  std::string refused;
  if (S_ISDIR(about.st_mode)) {
    refused = path + " is a folder; name the files in it.";
  } else if (!S_ISREG(about.st_mode)) {
    refused = path + " is not an ordinary file; name a file.";
  } else if (about.st_size == 0) {
    refused = path + " is empty; copy it again from the recorder.";
  }
  if (!refused.empty()) {
    ::close(descriptor);
    return Failure{refused};
  }
  return std::unique_ptr<ByteSource>(
      std::make_unique<FileSource>(descriptor, static_cast<std::uint64_t>(about.st_size)));
}

}  // namespace strikeplate
