# Installs the libraries, their headers, the program, and what find_package(heraldgauge) needs.
include(GNUInstallDirs)
include(CMakePackageConfigHelpers)

set(package_folder ${CMAKE_INSTALL_LIBDIR}/cmake/heraldgauge)
install(TARGETS heraldgauge_model heraldgauge_reference heraldgauge_fast heraldgauge_reports heraldgauge_compare
        EXPORT heraldgaugeTargets ARCHIVE DESTINATION ${CMAKE_INSTALL_LIBDIR})
install(TARGETS heraldgauge_program RUNTIME DESTINATION ${CMAKE_INSTALL_BINDIR})
install(EXPORT heraldgaugeTargets NAMESPACE heraldgauge:: DESTINATION ${package_folder})
install(DIRECTORY reference fast reports compare DESTINATION ${CMAKE_INSTALL_INCLUDEDIR}/heraldgauge
        FILES_MATCHING PATTERN "*.hpp" PATTERN compare/cli EXCLUDE PATTERN schema EXCLUDE PATTERN cmake EXCLUDE)
install(DIRECTORY reports/schema DESTINATION ${CMAKE_INSTALL_DATADIR}/heraldgauge)

configure_package_config_file(reference/cmake/heraldgaugeConfig.cmake.in heraldgaugeConfig.cmake
                              INSTALL_DESTINATION ${package_folder})
write_basic_package_version_file(heraldgaugeConfigVersion.cmake COMPATIBILITY SameMinorVersion)
install(FILES ${PROJECT_BINARY_DIR}/heraldgaugeConfig.cmake ${PROJECT_BINARY_DIR}/heraldgaugeConfigVersion.cmake
              reference/cmake/FindGMP.cmake reference/cmake/FindMPFI.cmake
        DESTINATION ${package_folder})
