# Writes OUTPUT, a C++ source that holds every numbered SQL file of FOLDER as text (declared in store/schema_files.h).
# Run by the build: cmake -DFOLDER=… -DOUTPUT=… -P embed_sql.cmake
file(GLOB sql_files "${FOLDER}/[0-9][0-9][0-9][0-9]_*.sql")
list(SORT sql_files)
set(rows "")
set(expected 0)
foreach(sql_file IN LISTS sql_files)
  get_filename_component(name "${sql_file}" NAME)
  math(EXPR expected "${expected} + 1")
  string(REGEX MATCH "^[0-9]+" digits "${name}")
  string(REGEX REPLACE "^0+" "" number "${digits}")
  if(NOT "${number}" STREQUAL "${expected}")
    message(FATAL_ERROR "${sql_file}: schema files are numbered 0001, 0002, … without gaps; expected number ${expected}")
  endif()
  file(READ "${sql_file}" sql)
  string(APPEND rows "    {${number}, \"${name}\", R\"nearpit_sql(${sql})nearpit_sql\"},\n")
endforeach()
if(expected EQUAL 0)
  message(FATAL_ERROR "${FOLDER}: no numbered SQL file (0001_….sql) found")
endif()
file(WRITE "${OUTPUT}" "#include \"store/schema_files.h\"

namespace nearpit::store {

const SchemaFile kSchemaFiles[] = {
${rows}};

const int kSchemaFileCount = ${expected};

}  // namespace nearpit::store
")
