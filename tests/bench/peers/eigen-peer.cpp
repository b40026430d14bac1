// The peer of the solve.* and chain.W.* measurements: the same frames by Eigen's SimplicialLDLT.
//
// usage: eigen-peer FRAMES [ordered], FRAMES as write-frames.ts writes it. Then, line by line on standard input:
//   solve N   all frames N times: stiffness + load vectors + factor + all load cases; answers CPU seconds
//   bare N    all frames N times: K as it stands factored, one load case solved; answers CPU seconds
//   write F   displacements of the frames to file F: by frame, case, node, 3 doubles (0 where held)
//
// As the engine does, what frames of one shape share is done once: the pattern of K, where each member's numbers go, and
// analyzePattern, which orders the unknowns (Eigen's approximate minimum degree) as the documentation has it used. K is the upper
// triangle, which that needs; its storage, the right-hand sides' and the solutions' are made once.
// ordered: the unknowns are numbered in Eigen's order beforehand, so that nothing is permuted in the loop at all.
#include <Eigen/Sparse>
#include <cmath>
#include <cstdint>
#include <cstdio>
#include <cstdlib>
#include <ctime>
#include <fstream>
#include <iostream>
#include <string>
#include <vector>

using Matrix = Eigen::SparseMatrix<double, Eigen::ColMajor, int>;
using Factors = Eigen::SimplicialLDLT<Matrix, Eigen::Upper>;
using OrderedFactors = Eigen::SimplicialLDLT<Matrix, Eigen::Upper, Eigen::NaturalOrdering<int>>;

struct Member { double length, cos, sin, EA, EI; };
// linear along local x and y from a to b
struct Line { double a, b, qx1, qx2, qy1, qy2; };
struct NodeLoad { double Fx, Fy, Mz; };
struct On { int32_t index, loadCase; };

struct Frame {
  std::vector<Member> members;
  std::vector<On> lineOn, nodeOn;
  std::vector<Line> lines;
  std::vector<NodeLoad> nodeLoads;
};

static int nodes, members, cases, unknowns;
static std::vector<int32_t> starts, ends;
static std::vector<int> unknownOf;  // 3 a node, -1 where held
static std::vector<int> dofs;       // 6 a member
static std::vector<int> slots;      // 21 a member: where k's upper triangle goes among K's values, -1 nowhere
static std::vector<Frame> frames;
static Matrix K;
static Factors factors;
static OrderedFactors orderedFactors;
static bool ordered;
static Eigen::MatrixXd f, d;

template <class T> static void read(std::ifstream& in, std::vector<T>& to, size_t count) {
  to.resize(count);
  in.read(reinterpret_cast<char*>(to.data()), static_cast<std::streamsize>(count * sizeof(T)));
}

static void readFrames(const char* name) {
  std::ifstream in(name, std::ios::binary);
  if (!in) { std::fprintf(stderr, "cannot read %s\n", name); std::exit(1); }
  std::vector<int32_t> head;
  read(in, head, 4);
  nodes = head[0]; members = head[1]; cases = head[2];
  std::vector<int32_t> free;
  read(in, free, 3 * nodes);
  read(in, starts, members);
  read(in, ends, members);
  unknownOf.assign(3 * nodes, -1);
  for (int i = 0; i < 3 * nodes; i++) if (free[i]) unknownOf[i] = unknowns++;
  frames.resize(head[3]);
  for (Frame& frame : frames) {
    std::vector<int32_t> counts;
    read(in, counts, 2);
    read(in, frame.members, members);
    read(in, frame.lineOn, counts[0]);
    read(in, frame.lines, counts[0]);
    read(in, frame.nodeOn, counts[1]);
    read(in, frame.nodeLoads, counts[1]);
  }
}

static void setDofs() {
  dofs.resize(6 * members);
  for (int m = 0; m < members; m++)
    for (int r = 0; r < 3; r++) {
      dofs[6 * m + r] = unknownOf[3 * starts[m] + r];
      dofs[6 * m + 3 + r] = unknownOf[3 * ends[m] + r];
    }
}

static Matrix pattern(bool whole) {
  std::vector<Eigen::Triplet<double, int>> entries;
  for (int m = 0; m < members; m++)
    for (int r = 0; r < 6; r++)
      for (int c = 0; c < 6; c++) {
        const int i = dofs[6 * m + r], j = dofs[6 * m + c];
        if (i >= 0 && j >= 0 && (whole || i <= j)) entries.emplace_back(i, j, 1.0);
      }
  Matrix made(unknowns, unknowns);
  made.setFromTriplets(entries.begin(), entries.end());
  made.makeCompressed();
  return made;
}

static void orderUnknowns() {
  Eigen::PermutationMatrix<Eigen::Dynamic, Eigen::Dynamic, int> order;
  Eigen::AMDOrdering<int>()(pattern(true), order);  // order.indices()[new] = old
  std::vector<int> newOf(unknowns);
  for (int i = 0; i < unknowns; i++) newOf[order.indices()[i]] = i;
  for (int& u : unknownOf) if (u >= 0) u = newOf[u];
  setDofs();
}

static void shareWork() {
  setDofs();
  if (ordered) orderUnknowns();
  K = pattern(false);
  if (ordered) orderedFactors.analyzePattern(K); else factors.analyzePattern(K);
  slots.assign(21 * members, -1);
  for (int m = 0; m < members; m++)
    for (int r = 0, at = 0; r < 6; r++)
      for (int c = r; c < 6; c++, at++) {
        const int i = dofs[6 * m + r], j = dofs[6 * m + c];
        if (i < 0 || j < 0) continue;
        const int row = i < j ? i : j, column = i < j ? j : i;
        for (int k = K.outerIndexPtr()[column]; k < K.outerIndexPtr()[column + 1]; k++)
          if (K.innerIndexPtr()[k] == row) slots[21 * m + at] = k;
      }
  f.resize(unknowns, cases);
  d.resize(unknowns, cases);
}

static void assemble(const Frame& frame) {
  double* values = K.valuePtr();
  for (Eigen::Index i = 0; i < K.nonZeros(); i++) values[i] = 0;
  for (int m = 0; m < members; m++) {
    const Member& e = frame.members[m];
    const double L = e.length, c = e.cos, s = e.sin;
    const double ka = e.EA / L, S = 4 * e.EI / L, T = 2 * e.EI / L, kt = (S + T) / L, kv = 2 * kt / L;
    const double xx = c * c * ka + s * s * kv, xy = c * s * (ka - kv), yy = s * s * ka + c * c * kv;
    const double k[21] = {xx, xy, -s * kt, -xx, -xy, -s * kt,  //
                          yy, c * kt, -xy, -yy, c * kt,        //
                          S, s * kt, -c * kt, T,               //
                          xx, xy, s * kt,                      //
                          yy, -c * kt,                         //
                          S};
    const int* slot = &slots[21 * m];
    for (int i = 0; i < 21; i++) if (slot[i] >= 0) values[slot[i]] += k[i];
  }
}

static void loadVectors(const Frame& frame) {
  static const double at[3] = {0.5 - std::sqrt(0.15), 0.5, 0.5 + std::sqrt(0.15)}, weight[3] = {5. / 18, 8. / 18, 5. / 18};
  f.setZero();
  for (size_t l = 0; l < frame.lines.size(); l++) {
    const On on = frame.lineOn[l];
    const Member& e = frame.members[on.index];
    const Line& q = frame.lines[l];
    const double L = e.length;
    double X1 = 0, X2 = 0, Y1 = 0, Y2 = 0, m1 = 0, m2 = 0;
    if (q.a == 0 && q.b == L && q.qx1 == q.qx2 && q.qy1 == q.qy2) {
      X1 = X2 = -0.5 * q.qx1 * L;
      Y1 = Y2 = -0.5 * q.qy1 * L;
      m1 = Y1 * L / 6;
      m2 = -m1;
    } else {
      for (int g = 0; g < 3; g++) {
        const double x = (q.a + (q.b - q.a) * at[g]) / L, w = (q.b - q.a) * weight[g];
        const double px = w * (q.qx1 + (q.qx2 - q.qx1) * at[g]), py = w * (q.qy1 + (q.qy2 - q.qy1) * at[g]);
        X1 -= px * (1 - x);
        X2 -= px * x;
        Y1 -= py * (1 - x);
        Y2 -= py * x;
        m1 -= py * L * x * (1 - x) * (1 - x);
        m2 += py * L * x * x * (1 - x);
      }
      Y1 += (m1 + m2) / L;
      Y2 -= (m1 + m2) / L;
    }
    double* column = f.data() + static_cast<Eigen::Index>(on.loadCase) * unknowns;
    const int* dof = &dofs[6 * on.index];
    if (dof[0] >= 0) column[dof[0]] -= X1 * e.cos - Y1 * e.sin;
    if (dof[1] >= 0) column[dof[1]] -= X1 * e.sin + Y1 * e.cos;
    if (dof[2] >= 0) column[dof[2]] -= m1;
    if (dof[3] >= 0) column[dof[3]] -= X2 * e.cos - Y2 * e.sin;
    if (dof[4] >= 0) column[dof[4]] -= X2 * e.sin + Y2 * e.cos;
    if (dof[5] >= 0) column[dof[5]] -= m2;
  }
  for (size_t l = 0; l < frame.nodeLoads.size(); l++) {
    const On on = frame.nodeOn[l];
    const double P[3] = {frame.nodeLoads[l].Fx, frame.nodeLoads[l].Fy, frame.nodeLoads[l].Mz};
    for (int r = 0; r < 3; r++) if (unknownOf[3 * on.index + r] >= 0) f(unknownOf[3 * on.index + r], on.loadCase) += P[r];
  }
}

template <class A, class B, class X> static void factorAndSolve(const A& stiffness, const B& load, X& x) {
  if (ordered) {
    orderedFactors.factorize(stiffness);
    x = orderedFactors.solve(load);
  } else {
    factors.factorize(stiffness);
    x = factors.solve(load);
  }
}

static void solveFrame(const Frame& frame) {
  assemble(frame);
  loadVectors(frame);
  factorAndSolve(K, f, d);
}

static double cpuSeconds() {
  timespec now;
  clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &now);
  return now.tv_sec + now.tv_nsec * 1e-9;
}

static void writeDisplacements(const std::string& name) {
  std::ofstream out(name, std::ios::binary);
  std::vector<double> row(3 * nodes);
  for (const Frame& frame : frames) {
    solveFrame(frame);
    for (int c = 0; c < cases; c++) {
      for (int i = 0; i < 3 * nodes; i++) row[i] = unknownOf[i] < 0 ? 0 : d(unknownOf[i], c);
      out.write(reinterpret_cast<char*>(row.data()), static_cast<std::streamsize>(row.size() * sizeof(double)));
    }
  }
}

/** Nothing but factor and solve, as often as asked: K of one frame after another stands assembled already. */
static double bare(int times) {
  std::vector<Matrix> stiffness;
  Eigen::MatrixXd load(unknowns, frames.size());
  for (size_t i = 0; i < frames.size(); i++) {
    assemble(frames[i]);
    loadVectors(frames[i]);
    stiffness.push_back(K);
    load.col(i) = f.col(0);
  }
  Eigen::VectorXd x(unknowns);
  const double before = cpuSeconds();
  for (size_t i = 0; i < frames.size(); i++)
    for (int n = 0; n < times; n++) factorAndSolve(stiffness[i], load.col(i), x);
  return cpuSeconds() - before;
}

int main(int count, char** words) {
  if (count < 2) return 2;
  ordered = count > 2 && std::string(words[2]) == "ordered";
  readFrames(words[1]);
  shareWork();
  std::string what, rest;
  while (std::cin >> what >> rest) {
    if (what == "write") {
      writeDisplacements(rest);
      std::printf("0\n");
    } else if (what == "bare") {
      std::printf("%.9f\n", bare(std::atoi(rest.c_str())));
    } else {
      const double before = cpuSeconds();
      for (int n = std::atoi(rest.c_str()); n > 0; n--) for (const Frame& frame : frames) solveFrame(frame);
      std::printf("%.9f\n", cpuSeconds() - before);
    }
    std::fflush(stdout);
  }
  return 0;
}
