# The Debian package, made by packaging/package.sh.
set(CPACK_GENERATOR DEB)
set(CPACK_PACKAGE_NAME strikeplate)
set(CPACK_PACKAGE_VENDOR "The Strikeplate authors")
set(CPACK_PACKAGE_CONTACT "The Strikeplate authors <strikeplate@localhost>")
set(CPACK_PACKAGE_DESCRIPTION_SUMMARY "workstation for near-surface seismic refraction")
set(CPACK_PACKAGE_DESCRIPTION
"Opens the shot records of a refraction line, picks first breaks, assigns them to layers, solves for the depth
under every geophone with bands that hold 68 and 95 %, sets every published hand method beside it, lists the reasons to
doubt, and prints a field interpretation sheet. strikeplate-batch gives the same answers without a screen.")
set(CPACK_PACKAGE_INSTALL_DIRECTORY strikeplate)
set(CPACK_PACKAGING_INSTALL_PREFIX /usr)
set(CPACK_STRIP_FILES ON)
set(CPACK_DEBIAN_FILE_NAME DEB-DEFAULT)
set(CPACK_DEBIAN_PACKAGE_SECTION science)
set(CPACK_DEBIAN_PACKAGE_PRIORITY optional)
set(CPACK_DEBIAN_PACKAGE_SHLIBDEPS ON)
# Loaded at run time, so that no library says them: the window's platform plugin.
set(CPACK_DEBIAN_PACKAGE_DEPENDS "qt6-qpa-plugins")
set(CPACK_DEBIAN_PACKAGE_RECOMMENDS "fonts-dejavu-core")
include(CPack)
