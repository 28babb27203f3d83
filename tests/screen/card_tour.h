// Every card and panel of the window, one after the other, with short and with long content, for tests of how all of them look.
#ifndef NEARPIT_TESTS_SCREEN_CARD_TOUR_H_
#define NEARPIT_TESTS_SCREEN_CARD_TOUR_H_

#include <string>
#include <vector>

#include "screen/screen_driver.h"

namespace nearpit::ui {

class TourGuest {
 public:
  virtual ~TourGuest() = default;
  // A program was started; it shows something already.
  virtual void begins(ScreenDriver&) {}
  virtual void sees(ScreenDriver& screen, const std::string& card) = 0;
  virtual void ends(ScreenDriver&) {}
};

// Goes through all of them on such a glass.
void tour_of_cards(const TestGlass& glass, bool dusk, TourGuest& guest);

// The text holds a name that comes from outside and may be as long as it likes: of a find, crew, survey, file, folder.
bool holds_outside_name(const std::string& text);

}  // namespace nearpit::ui

#endif  // NEARPIT_TESTS_SCREEN_CARD_TOUR_H_
