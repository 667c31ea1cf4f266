# Installation and export: find_package(raiser) gives raiser::mesh,
# raiser::solver, raiser::validation and raiser::io. Headers go to
# include/raiser, so that users include "solver/solution.hpp" as we do.
include(GNUInstallDirs)
include(CMakePackageConfigHelpers)

set(raiser_config_dir ${CMAKE_INSTALL_LIBDIR}/cmake/raiser)

foreach(layer mesh solver validation io)
  set_target_properties(raiser_${layer} PROPERTIES EXPORT_NAME ${layer} SOVERSION ${PROJECT_VERSION_MAJOR} VERSION ${PROJECT_VERSION})
  target_compile_features(raiser_${layer} PUBLIC cxx_std_20)
  target_include_directories(raiser_${layer} PUBLIC $<INSTALL_INTERFACE:${CMAKE_INSTALL_INCLUDEDIR}/raiser>)
  install(TARGETS raiser_${layer} EXPORT raiser-targets)
  install(
    DIRECTORY ${PROJECT_SOURCE_DIR}/${layer}
    DESTINATION ${CMAKE_INSTALL_INCLUDEDIR}/raiser
    FILES_MATCHING
    PATTERN "*.hpp")
endforeach()

# The program; it finds shared libraries of ours beside itself.
file(RELATIVE_PATH to_libraries ${CMAKE_INSTALL_FULL_BINDIR} ${CMAKE_INSTALL_FULL_LIBDIR})
set_target_properties(raiser PROPERTIES RUNTIME_OUTPUT_DIRECTORY ${PROJECT_BINARY_DIR} INSTALL_RPATH $ORIGIN/${to_libraries})
install(TARGETS raiser)

install(
  EXPORT raiser-targets
  NAMESPACE raiser::
  DESTINATION ${raiser_config_dir})
configure_package_config_file(${CMAKE_CURRENT_LIST_DIR}/raiser-config.cmake.in ${PROJECT_BINARY_DIR}/raiser-config.cmake
                              INSTALL_DESTINATION ${raiser_config_dir})
write_basic_package_version_file(${PROJECT_BINARY_DIR}/raiser-config-version.cmake COMPATIBILITY SameMinorVersion)
install(FILES ${PROJECT_BINARY_DIR}/raiser-config.cmake ${PROJECT_BINARY_DIR}/raiser-config-version.cmake
        DESTINATION ${raiser_config_dir})
