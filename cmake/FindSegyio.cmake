# Finds the segyio C library as Segyio::Segyio. (The package's own CMake file does not say where its library is when the
# header and the library stand in different prefixes, as in Debian.)
find_path(Segyio_INCLUDE_DIR segyio/segy.h)
find_library(Segyio_LIBRARY segyio)
include(FindPackageHandleStandardArgs)
find_package_handle_standard_args(Segyio REQUIRED_VARS Segyio_LIBRARY Segyio_INCLUDE_DIR)
if(Segyio_FOUND AND NOT TARGET Segyio::Segyio)
  add_library(Segyio::Segyio UNKNOWN IMPORTED)
  set_target_properties(Segyio::Segyio PROPERTIES
    IMPORTED_LOCATION "${Segyio_LIBRARY}" INTERFACE_INCLUDE_DIRECTORIES "${Segyio_INCLUDE_DIR}")
endif()
