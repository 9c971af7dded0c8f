// The same work by GiNaC: from ln Q to thirteen properties, raw, and brought to normal form with TeX.
//
// Reads from standard input one line with the names of the parameters, parted by blanks, and one
// line with ln Q; writes {"rawMs", "displayMs", "characters"}.
#include <ginac/ginac.h>

#include <signal.h>
#include <unistd.h>

#include <algorithm>
#include <chrono>
#include <cstring>
#include <iostream>
#include <sstream>
#include <string>
#include <vector>

using namespace GiNaC;

static const int RUNS = 5;
static const unsigned NORMAL_LIMIT_S = 60;

// What stands when bringing to normal form takes longer than the limit.
static char withoutDisplay[128];

static void expire(int) {
  if (write(STDOUT_FILENO, withoutDisplay, std::strlen(withoutDisplay)) > 0) _exit(0);
  _exit(1);
}

static std::vector<ex> properties(const ex &f, const symbol &N, const symbol &V, const symbol &T,
                                  const symbol &k, const symbol &m) {
  const ex p = k * T * f.diff(V);
  const ex U = k * T * T * f.diff(T);
  const ex S = k * f + U / T;
  const ex A = -k * T * f;
  const ex mu = -k * T * f.diff(N);
  const ex H = U + p * V;
  const ex G = A + p * V;
  const ex C_V = U.diff(T);
  const ex p_T = p.diff(T);
  const ex p_V = p.diff(V);
  const ex kappa_T = -1 / (V * p_V);
  const ex alpha = -p_T / (V * p_V);
  const ex C_p = C_V - T * p_T * p_T / p_V;
  const ex mu_JT = -(T * p_T / p_V + V) / C_p;
  const ex w2 = V * V / (N * m) * (T * p_T * p_T / C_V - p_V);
  return {p, U, S, A, mu, H, G, C_V, kappa_T, alpha, C_p, mu_JT, w2};
}

template <typename Work> static double medianMs(Work work) {
  std::vector<double> times;
  for (int run = 0; run < RUNS; ++run) {
    const auto start = std::chrono::steady_clock::now();
    work();
    const std::chrono::duration<double, std::milli> taken = std::chrono::steady_clock::now() - start;
    times.push_back(taken.count());
  }
  std::sort(times.begin(), times.end());
  return times[times.size() / 2];
}

int main() {
  std::string names, text;
  std::getline(std::cin, names);
  std::getline(std::cin, text);
  symbol N("N"), V("V"), T("T"), k("k"), h("h"), m("m");
  symtab table{{"N", N}, {"V", V}, {"T", T}, {"k", k}, {"h", h}, {"m", m}, {"pi", Pi}};
  std::istringstream words(names);
  for (std::string name; words >> name;) table[name] = symbol(name);
  parser read(table);

  ex f = read(text);
  const double rawMs = medianMs([&] { properties(f, N, V, T, k, m); });
  std::ostringstream partial;
  partial << "{\"rawMs\":" << rawMs << ",\"displayMs\":null,\"characters\":null}\n";
  std::strncpy(withoutDisplay, partial.str().c_str(), sizeof withoutDisplay - 1);
  signal(SIGALRM, expire);
  alarm(NORMAL_LIMIT_S);
  std::size_t characters = 0;
  const double displayMs = medianMs([&] {
    characters = 0;
    for (const ex &property : properties(f, N, V, T, k, m)) {
      const ex shown = property.normal();
      std::ostringstream tex, plain;
      tex << latex << shown;
      plain << shown;
      characters += plain.str().size();
    }
  });
  alarm(0);
  std::cout << "{\"rawMs\":" << rawMs << ",\"displayMs\":" << displayMs
            << ",\"characters\":" << characters << "}\n";
}
