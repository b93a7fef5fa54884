#pragma once

#include <string>
#include <string_view>

#include <nlohmann/json.hpp>

namespace strikeplate {

/// A text as JSON without loss: valid UTF-8 as a string, other bytes as {"latin1": string}.
nlohmann::json textToJson(std::string_view text);
/// The text back; empty for null. Throws nlohmann::json::exception when it is neither form.
std::string textFromJson(const nlohmann::json& json);

/// The member, or null where the object has none.
const nlohmann::json& member(const nlohmann::json& object, const char* key);

}  // namespace strikeplate
