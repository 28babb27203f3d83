// Sums that keep their digits when terms of very different size, or of both signs, meet: the rounding error of each addition is
// carried along (Neumaier A 1974, Z. Angew. Math. Mech. 54:39-51). Error about one rounding of the result plus n eps^2 sum |x|.
#ifndef NEARPIT_ESTIMATE_COMPENSATED_SUM_H_
#define NEARPIT_ESTIMATE_COMPENSATED_SUM_H_

#include <cmath>

namespace nearpit {

class CompensatedSum {
 public:
  void add(double term) {
    const double next = sum_ + term;
    lost_ += std::abs(sum_) >= std::abs(term) ? (sum_ - next) + term : (term - next) + sum_;
    sum_ = next;
  }
  double value() const { return sum_ + lost_; }

 private:
  double sum_ = 0;
  double lost_ = 0;
};

}  // namespace nearpit

#endif  // NEARPIT_ESTIMATE_COMPENSATED_SUM_H_
