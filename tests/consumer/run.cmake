# Installs the build tree `build` into an empty prefix below `scratch`, then
# configures, builds and runs the project `source` against it. Stops at the
# first command that fails.
set(prefix ${scratch}/prefix)
set(tree ${scratch}/build)
file(REMOVE_RECURSE ${prefix} ${tree})

function(run)
  execute_process(COMMAND ${ARGV} WORKING_DIRECTORY ${scratch} COMMAND_ECHO STDOUT COMMAND_ERROR_IS_FATAL ANY)
endfunction()

run(${CMAKE_COMMAND} --install ${build} --prefix ${prefix})
run(${CMAKE_COMMAND} -S ${source} -B ${tree} -G ${generator} -D CMAKE_BUILD_TYPE=Release -D CMAKE_PREFIX_PATH=${prefix}
    -D CMAKE_CXX_COMPILER=${compiler} -D CMAKE_CXX_FLAGS=${flags} -D RAISER_VERSION=${version})
run(${CMAKE_COMMAND} --build ${tree})
run(${tree}/consumer)
