#include "solver/linear/elimination.hpp"

#include <cblas.h>

#include <algorithm>
#include <stdexcept>

extern "C" void dpotrf_(const char* uplo, const int* n, double* a, const int* lda, int* info);

namespace raiser::solver {
namespace {

/// A dense column-major front in two parts: the eliminated columns, kept in
/// the factors, and the square that is handed to the parent. Only the lower
/// triangle is used.
struct Dense {
  double* columns;  ///< rows x eliminated
  double* border;   ///< (rows - eliminated) squared
  int rows;
  int eliminated;

  /// Start of column c, such that row r of the front is at [r].
  double* column(int c) const {
    if (c < eliminated) return columns + static_cast<std::size_t>(c) * rows;
    const int width = rows - eliminated;
    return border + static_cast<std::size_t>(c - eliminated) * width - eliminated;
  }
};

/// Consecutive rows of a matrix that go to consecutive rows of a front.
struct Run {
  int from;
  int to;
  int length;
};

/// The runs of `place`, which holds by row of a matrix its row in the front, or
/// -1 for a row that is left out. An entity's functions are consecutive, so
/// runs are long.
void find_runs(const std::vector<int>& place, std::vector<Run>& runs) {
  runs.clear();
  for (int k = 0; k < static_cast<int>(place.size()); ++k) {
    if (place[k] < 0) continue;
    if (!runs.empty() && runs.back().from + runs.back().length == k &&
        runs.back().to + runs.back().length == place[k])
      ++runs.back().length;
    else
      runs.push_back({k, place[k], 1});
  }
}

/// Puts zeros into the lower triangle of the front.
void clear(const Dense& front) {
  for (int c = 0; c < front.rows; ++c) std::fill(front.column(c) + c, front.column(c) + front.rows, 0.0);
}

/// Merges a symmetric n x n matrix into the lower triangle of the front, entry by
/// entry. Read are only entries whose place is in that triangle.
template <class Merge>
void merge(const Dense& front, const double* matrix, int n, const std::vector<Run>& runs, Merge entry) {
  for (const Run& across : runs)
    for (int c = 0; c < across.length; ++c) {
      double* to = front.column(across.to + c);
      const double* from = matrix + static_cast<std::size_t>(across.from + c) * n;
      for (const Run& down : runs) {
        if (down.to < across.to) continue;
        double* target = to + down.to;
        const double* source = from + down.from;
        for (int r = &down == &across ? c : 0; r < down.length; ++r) entry(target[r], source[r]);
      }
    }
}

void eliminate(const Dense& front) {
  if (front.eliminated == 0) return;
  const int border = front.rows - front.eliminated;
  int info = 0;
  dpotrf_("L", &front.eliminated, front.columns, &front.rows, &info);
  // The pivots of a matrix that is not finite are not numbers, which dpotrf may let pass.
  for (int k = 0; k < front.eliminated; ++k)
    if (!(front.column(k)[k] > 0.0)) info = k + 1;
  if (info != 0)
    throw std::runtime_error(
        "Factorisation: a pivot is not positive; the plate can move or a triangle is degenerate");
  if (border == 0) return;
  double* below = front.columns + front.eliminated;
  cblas_dtrsm(CblasColMajor, CblasRight, CblasLower, CblasTrans, CblasNonUnit, border, front.eliminated, 1.0,
              front.columns, front.rows, below, front.rows);
  cblas_dsyrk(CblasColMajor, CblasLower, CblasNoTrans, border, front.eliminated, -1.0, below, front.rows, 1.0,
              front.border, border);
}

}  // namespace

void Factorisation::number(const EliminationTree& tree, const Discretisation& space,
                           const std::vector<bool>& held) {
  position_.assign(space.unknowns(), -1);
  entity_first_.assign(space.entities(), 0);
  entity_count_.assign(space.entities(), 0);
  for (const int entity : tree.order()) {
    entity_first_[entity] = free_;
    for (int u = 2 * space.first_function(entity); u < 2 * space.first_function(entity + 1); ++u)
      if (!held[u]) position_[u] = free_++;
    entity_count_[entity] = free_ - entity_first_[entity];
  }
}

void Factorisation::lay_out(const EliminationTree& tree, Room& room) {
  std::size_t size = 0;
  int first = 0;
  fronts_.reserve(tree.groups().size());
  for (const EliminationTree::Group& group : tree.groups()) {
    Front front;
    front.first = first;
    for (int k = 0; k < group.eliminated; ++k) front.eliminated += entity_count_[group.entities[k]];
    for (std::size_t k = group.eliminated; k < group.entities.size(); ++k)
      for (int i = 0; i < entity_count_[group.entities[k]]; ++i)
        front.border.push_back(entity_first_[group.entities[k]] + i);
    first += front.eliminated;
    front.offset = size;
    size += static_cast<std::size_t>(front.eliminated) * (front.eliminated + front.border.size());
    fronts_.push_back(std::move(front));
  }
  entries_ = size;
  factors_ = room.take(size + pending(tree));
}

std::size_t Factorisation::pending(const EliminationTree& tree) const {
  std::size_t held = 0, most = 0;
  for (std::size_t g = 0; g < fronts_.size(); ++g) {
    const EliminationTree::Group& group = tree.groups()[g];
    held += fronts_[g].square();
    most = std::max(most, held);
    if (group.triangle >= 0) continue;
    for (const int child : group.children) held -= fronts_[child].square();
  }
  return most;
}

Factorisation::Factorisation(const EliminationTree& tree, const Discretisation& space,
                             const std::vector<bool>& held, const ElementMatrix& element, Room& room) {
  number(tree, space, held);
  lay_out(tree, room);
  std::vector<int> row_of(free_, 0);  // by place in elimination order: row in the current front
  // Children come just before their parent, so that squares wait on a stack.
  double* top = factors_ + entries_;
  std::vector<int> place;
  std::vector<Run> runs;
  Discretisation::Local local;
  Eigen::MatrixXd matrix;
  for (std::size_t g = 0; g < fronts_.size(); ++g) {
    const Front& front = fronts_[g];
    const EliminationTree::Group& group = tree.groups()[g];
    const int border = static_cast<int>(front.border.size());
    const Dense dense{factors_ + front.offset, top, front.eliminated + border, front.eliminated};
    for (int k = 0; k < front.eliminated; ++k) row_of[front.first + k] = k;
    for (int k = 0; k < border; ++k) row_of[front.border[k]] = front.eliminated + k;
    double* bottom = top;
    if (group.triangle >= 0) {
      space.local(group.triangle, local);
      element(group.triangle, matrix);
      place.clear();
      for (const int f : local.function)
        for (int c = 0; c < 2; ++c)
          place.push_back(position_[2 * f + c] < 0 ? -1 : row_of[position_[2 * f + c]]);
      find_runs(place, runs);
      merge(dense, matrix.data(), static_cast<int>(place.size()), runs,
            [](double& to, double from) { to = from; });  // its only entries
    } else {
      clear(dense);
      for (const int child : group.children) bottom -= fronts_[child].square();
      const double* square = bottom;
      for (const int child : group.children) {
        place.clear();
        for (const int u : fronts_[child].border) place.push_back(row_of[u]);
        find_runs(place, runs);
        merge(dense, square, static_cast<int>(place.size()), runs,
              [](double& to, double from) { to += from; });
        square += fronts_[child].square();
      }
    }
    eliminate(dense);
    if (bottom != top) std::copy_n(dense.border, front.square(), bottom);
    top = bottom + front.square();
  }
}

void Factorisation::solve_at(const Front& front, bool transposed, Eigen::MatrixXd& x) const {
  const int rows = front.eliminated + static_cast<int>(front.border.size());
  cblas_dtrsm(CblasColMajor, CblasLeft, CblasLower, transposed ? CblasTrans : CblasNoTrans, CblasNonUnit,
              front.eliminated, static_cast<int>(x.cols()), 1.0, panel(front), rows, x.data() + front.first,
              free_);
}

Eigen::MatrixXd Factorisation::halfway(const Eigen::MatrixXd& loads) const {
  const int columns = static_cast<int>(loads.cols());
  Eigen::MatrixXd x = Eigen::MatrixXd::Zero(free_, columns);
  std::vector<bool> is_loaded(free_, false);
  for (Eigen::Index u = 0; u < loads.rows(); ++u) {
    if (position_[u] < 0 || (loads.row(u).array() == 0.0).all()) continue;
    x.row(position_[u]) = loads.row(u);
    is_loaded[position_[u]] = true;
  }
  Eigen::MatrixXd border;
  for (const Front& front : fronts_) {
    const auto first = is_loaded.begin() + front.first;
    if (std::find(first, first + front.eliminated, true) == first + front.eliminated) continue;
    solve_at(front, false, x);
    const int n = static_cast<int>(front.border.size());
    if (n == 0) continue;
    border.resize(n, columns);
    cblas_dgemm(CblasColMajor, CblasNoTrans, CblasNoTrans, n, columns, front.eliminated, 1.0,
                panel(front) + front.eliminated, front.eliminated + n, x.data() + front.first, free_, 0.0,
                border.data(), n);
    for (int k = 0; k < n; ++k) {
      x.row(front.border[k]) -= border.row(k);
      is_loaded[front.border[k]] = true;
    }
  }
  return x;
}

Eigen::MatrixXd Factorisation::solve(const Eigen::MatrixXd& loads) const {
  const int columns = static_cast<int>(loads.cols());
  Eigen::MatrixXd x = halfway(loads);
  Eigen::MatrixXd border;
  for (auto front = fronts_.rbegin(); front != fronts_.rend(); ++front) {
    if (front->eliminated == 0) continue;
    const int n = static_cast<int>(front->border.size());
    if (n > 0) {
      border.resize(n, columns);
      for (int k = 0; k < n; ++k) border.row(k) = x.row(front->border[k]);
      cblas_dgemm(CblasColMajor, CblasTrans, CblasNoTrans, front->eliminated, columns, n, -1.0,
                  panel(*front) + front->eliminated, front->eliminated + n, border.data(), n, 1.0,
                  x.data() + front->first, free_);
    }
    solve_at(*front, true, x);
  }
  Eigen::MatrixXd result = Eigen::MatrixXd::Zero(loads.rows(), columns);
  for (Eigen::Index u = 0; u < loads.rows(); ++u)
    if (position_[u] >= 0) result.row(u) = x.row(position_[u]);
  return result;
}

}  // namespace raiser::solver
