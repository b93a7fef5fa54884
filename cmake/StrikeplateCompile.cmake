# The compile rules that every target of the project shares.
add_library(strikeplate_compile INTERFACE)
target_compile_options(strikeplate_compile INTERFACE
  -Wall -Wextra -Wpedantic -Wshadow -Wnon-virtual-dtor -Woverloaded-virtual -Werror
  $<$<CONFIG:Release>:-O2 -fno-math-errno>)
if(STRIKEPLATE_SANITIZE)
  target_compile_options(strikeplate_compile INTERFACE -fsanitize=address,undefined -fno-sanitize-recover=all -fno-omit-frame-pointer -g)
  target_link_options(strikeplate_compile INTERFACE -fsanitize=address,undefined)
endif()
if(STRIKEPLATE_COVERAGE)
  target_compile_options(strikeplate_compile INTERFACE --coverage -O0 -g)
  target_link_options(strikeplate_compile INTERFACE --coverage)
endif()
if(STRIKEPLATE_FUZZ)
  target_compile_options(strikeplate_compile INTERFACE -fsanitize=fuzzer-no-link,address,undefined -fno-sanitize-recover=all -g)
  target_link_options(strikeplate_compile INTERFACE -fsanitize=address,undefined)
endif()

find_program(STRIKEPLATE_CCACHE ccache)
if(STRIKEPLATE_CCACHE AND NOT CMAKE_CXX_COMPILER_LAUNCHER)
  set(CMAKE_CXX_COMPILER_LAUNCHER ${STRIKEPLATE_CCACHE})
  set(CMAKE_C_COMPILER_LAUNCHER ${STRIKEPLATE_CCACHE})
endif()
