#include "tests/core/record/allocation_count.h"

#include <algorithm>
#include <cstdlib>
#include <new>

#include <malloc.h>

namespace {

std::size_t held = 0;
std::size_t most = 0;

void* take(std::size_t size) {
  void* memory = std::malloc(size == 0 ? 1 : size);
  if (memory == nullptr) {
    throw std::bad_alloc();
  }
  held += malloc_usable_size(memory);
  most = std::max(most, held);
  return memory;
}

void give(void* memory) noexcept {
  if (memory != nullptr) {
    held -= std::min(held, malloc_usable_size(memory));
    std::free(memory);
  }
}

}  // namespace

void* operator new(std::size_t size) {
  return take(size);
}
void* operator new[](std::size_t size) {
  return take(size);
}
void* operator new(std::size_t size, const std::nothrow_t&) noexcept {
  return take(size);
}
void* operator new[](std::size_t size, const std::nothrow_t&) noexcept {
  return take(size);
}
void operator delete(void* memory) noexcept {
  give(memory);
}
void operator delete[](void* memory) noexcept {
  give(memory);
}
void operator delete(void* memory, std::size_t) noexcept {
  give(memory);
}
void operator delete[](void* memory, std::size_t) noexcept {
  give(memory);
}

namespace strikeplate {

void AllocationCount::restart() {
  held = 0;
  most = 0;
}

std::size_t AllocationCount::highest() {
  return most;
}

}  // namespace strikeplate
