#pragma once

#include <cstddef>
#include <cstdint>
#include <memory>
#include <span>
#include <string>

#include "core/base/result.h"

namespace strikeplate {

/// Bytes that a reader takes piece by piece: a file, or a file's content in memory. Not to be shared between threads
/// while reading.
class ByteSource {
 public:
  virtual ~ByteSource() = default;

  /// Number of bytes.
  [[nodiscard]] virtual std::uint64_t size() const = 0;

  /// Copies the bytes from `offset` on into `into`; returns how many there were, at most into.size().
  [[nodiscard]] virtual std::size_t read(std::uint64_t offset, std::span<std::byte> into) const = 0;
};

/// A file's content that is in memory already; `bytes` must outlive the source.
std::unique_ptr<ByteSource> bytesInMemory(std::span<const std::byte> bytes);

/// Opens a file for reading. Refused in one sentence: a path that does not exist, may not be read, is a directory or
/// no ordinary file, or is empty.
Result<std::unique_ptr<ByteSource>> openBytes(const std::string& path);

}  // namespace strikeplate
