#include "store/layer_writer.h"

#include <gtest/gtest.h>

#include "store/survey_handle.h"
#include "store/survey_samples.h"

namespace nearpit {
namespace {

using samples::ForeignProgram;
using samples::ScratchFolder;

constexpr WallTime kLater{1777977630007, 120};  // 2026-05-05T10:40:30.007Z
constexpr const char* kMade = "2026-05-04T10:40:30.123Z";
constexpr const char* kChanged = "2026-05-05T10:40:30.007Z";

class LayerWriter : public testing::Test {
 protected:
  LayerWriter() : start_(samples::utm_start()), rows_(samples::sample_layers(start_)) {
    samples::make_survey(path_, start_, 0);
  }

  // Rows written, those of gpkg_contents too.
  std::int64_t update(const LayerChanges& changes) {
    auto file = SurveyFile::open(path_, false);
    EXPECT_TRUE(file.ok());
    const std::int64_t before = file->handle().db.rows_changed();
    auto save = file->begin();
    const Status updated = save->update_layers(changes, kLater);
    EXPECT_TRUE(updated.ok()) << updated.error().one_line();
    EXPECT_TRUE(save->commit().ok());
    return file->handle().db.rows_changed() - before;
  }
  std::string ask(const std::string& sql) { return ForeignProgram(path_).ask(sql); }
  std::string last_change(const std::string& layer) {
    return ask("SELECT last_change FROM gpkg_contents WHERE table_name = '" + layer + "'");
  }
  std::string box(const std::string& layer) {
    return ask("SELECT min_x || ' ' || min_y || ' ' || max_x || ' ' || max_y FROM gpkg_contents WHERE table_name = '" +
               layer + "'");
  }
  std::string differences() {
    auto file = SurveyFile::open(path_, true);
    return samples::in_text(check_layers(*file, rows_));
  }

  const ScratchFolder scratch_;
  const std::string path_ = scratch_.path("a.gpkg");
  const FileStart start_;
  LayerRows rows_;
};

TEST_F(LayerWriter, EqualRowsAreNotWrittenAgain) {
  const std::string before = samples::bytes_of(path_);
  LayerChanges same;
  same.put_pits = rows_.pits;
  same.clusters = rows_.clusters;
  same.closed_areas = rows_.closed_areas;
  EXPECT_EQ(update(same), 0);
  EXPECT_EQ(last_change("pits"), kMade);
  EXPECT_EQ(last_change("clusters"), kMade);
}

TEST_F(LayerWriter, AChangedRowKeepsItsFid) {
  const std::string fid = ask("SELECT fid FROM pits WHERE label = 'T1-1'");
  rows_.pits[0].outcome = "negative";
  rows_.pits[0].place = {500000.5, 4400000};
  rows_.pits[0].finds = {0, 0, 0, 0};
  EXPECT_EQ(update({{rows_.pits[0], rows_.pits[1]}, {}, {}, {}}), 1 + 2);  // the row; last_change and box
  EXPECT_EQ(ask("SELECT fid FROM pits WHERE label = 'T1-1'"), fid);
  EXPECT_EQ(last_change("pits"), kChanged);
  EXPECT_EQ(last_change("clusters"), kMade);
  EXPECT_EQ(last_change("boundary"), kMade);
  EXPECT_EQ(differences(), "");
}

TEST_F(LayerWriter, RowsComeAndGo) {
  rows_.pits.push_back(samples::pit_row("T1-9", 500200, 4399000));
  rows_.pits.erase(rows_.pits.begin());
  EXPECT_EQ(update({{rows_.pits.back()}, {"T1-1"}, {}, {}}), 2 + 2);
  EXPECT_EQ(differences(), "");
  EXPECT_EQ(box("pits"), "500000.0 4399000.0 500200.0 4400007.5");  // it only grows
}

TEST_F(LayerWriter, WholeLayersTouchOnlyWhatDiffers) {
  rows_.clusters.push_back({"T4-4", 2, 0, 200, true, {0, 1, 0, 0}, samples::square(500500, 4400500, 10)});
  EXPECT_EQ(update({{}, {}, rows_.clusters, {}}), 1 + 2);
  EXPECT_EQ(differences(), "");
  EXPECT_EQ(box("clusters"), "500005.0 4399995.0 500510.0 4400510.0");
  rows_.clusters.erase(rows_.clusters.begin());
  EXPECT_EQ(update({{}, {}, rows_.clusters, {}}), 1 + 2);
  rows_.clusters.clear();
  EXPECT_EQ(update({{}, {}, rows_.clusters, {}}), 1 + 1);
  rows_.closed_areas[0].open_again = true;
  rows_.closed_areas[0].outline.clear();
  EXPECT_EQ(update({{}, {}, {}, rows_.closed_areas}), 1 + 1);
  EXPECT_EQ(ask("SELECT geom FROM closed_areas"), "NULL");
  EXPECT_EQ(differences(), "");
}

TEST_F(LayerWriter, RefusesARowOfAnotherNumberOfFinds) {
  auto file = SurveyFile::open(path_, false);
  auto save = file->begin();
  PitRow row = rows_.pits[0];
  row.finds.pop_back();
  EXPECT_EQ(save->update_layers({{row}, {}, {}, {}}, kLater).error().kind, ErrorKind::kInternal);
}

}  // namespace
}  // namespace nearpit
