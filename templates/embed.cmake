# Writes a C++ source that holds the text of the templates, so that the program needs no installed
# files. Run as: cmake -DSOURCE=<templates> -DOUTPUT=<file> -P embed.cmake
# The declarations are in src/writers/embedded.hpp.
file(GLOB found RELATIVE ${SOURCE} ${SOURCE}/coq/*.v ${SOURCE}/coq/_CoqProject ${SOURCE}/latex/*)
list(SORT found)

set(text "// Generated from templates/ by templates/embed.cmake; changes here are lost.\n")
string(APPEND text "#include \"writers/embedded.hpp\"\n\n")
string(APPEND text "#include <stdexcept>\n#include <string>\n\n")
string(APPEND text "namespace sumwright::writers {\n\nnamespace {\n\n")
set(rows "")
set(count 0)
foreach(path IN LISTS found)
  file(READ ${SOURCE}/${path} content)
  string(FIND "${content}" ")EMBEDDED\"" clash)
  if(NOT clash EQUAL -1)
    message(FATAL_ERROR "${path} contains the delimiter of the embedded text")
  endif()
  string(APPEND text "constexpr std::string_view kText${count} = R\"EMBEDDED(")
  string(APPEND text "${content}")
  string(APPEND text ")EMBEDDED\";\n\n")
  string(APPEND rows "      {\"${path}\", kText${count}},\n")
  math(EXPR count "${count} + 1")
endforeach()
string(APPEND text "}  // namespace\n\n"
  "const std::vector<EmbeddedTemplate>& embedded_templates() {\n"
  "  static const std::vector<EmbeddedTemplate> all = {\n${rows}  };\n"
  "  return all;\n}\n\n"
  "std::string_view embedded_template(std::string_view path) {\n"
  "  for (const EmbeddedTemplate& entry : embedded_templates())\n"
  "    if (entry.path == path) return entry.text;\n"
  "  throw std::out_of_range(\"no template named \" + std::string(path));\n}\n\n"
  "}  // namespace sumwright::writers\n")
file(WRITE ${OUTPUT} "${text}")
