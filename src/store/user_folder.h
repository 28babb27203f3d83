// The user's own folder for what the program remembers of a person and a device: $XDG_CONFIG_HOME/nearpit, else ~/.config/nearpit. Files in it are
// the user's alone (0600, folders 0700) and are replaced whole and durably.
#ifndef NEARPIT_STORE_USER_FOLDER_H_
#define NEARPIT_STORE_USER_FOLDER_H_

#include <string>
#include <string_view>

#include "base/status.h"

namespace nearpit {

// $HOME when it is absolute, else the home folder that the system knows of; empty when there is none.
std::string home_folder();
// Empty when there is no home folder. Nothing is made yet. A relative $XDG_CONFIG_HOME is to be ignored (XDG Base Directory Specification 0.8).
std::string user_folder();

// "PREFIX-<id>": a survey's id comes out of a file from anywhere and must never become a path, so what is no UUID is hashed.
std::string name_for_survey(std::string_view prefix, const std::string& survey_id);

// Puts the text in place of what is there, if anything; makes the folder and those above it where they are missing.
// Errors: `folder` is empty; a folder can't be made; the file can't be written. Then the file is as it was.
Status replace_user_file(const std::string& folder, const std::string& name, const std::string& text);
// Takes the file away for good; none there is fine. Errors: it can't be taken away.
Status remove_user_file(const std::string& folder, const std::string& name);

}  // namespace nearpit

#endif  // NEARPIT_STORE_USER_FOLDER_H_
