"""Recounts what containment.c prints, with the subgraph search of the general-purpose graph library
NetworkX (A. Hagberg, D. Schult, P. Swart, Proceedings of SciPy 2008; Debian: python3-networkx).

A permutation becomes a tournament: an edge from each position to every later one, labelled by
whether the element goes up or down. Maps of one tournament into another that keep edges and labels
are exactly the embeddings of the one permutation into the other.
"""

import subprocess
import sys

try:
    import networkx
    from networkx.algorithms.isomorphism import DiGraphMatcher
except ImportError:
    print("skipped: NetworkX (python3-networkx) is not installed")
    sys.exit(77)


def tournament(text):
    elements = [] if text == "()" else [int(word) for word in text.split()]
    graph = networkx.DiGraph()
    graph.add_nodes_from(range(len(elements)))
    for i, a in enumerate(elements):
        for j in range(i + 1, len(elements)):
            graph.add_edge(i, j, up=a < elements[j])
    return graph


def count(pattern, text):
    if len(pattern) == 0:
        return 1  # the matcher does not take an empty pattern
    matcher = DiGraphMatcher(text, pattern, edge_match=lambda e, f: e["up"] == f["up"])
    return sum(1 for _ in matcher.subgraph_isomorphisms_iter())


def main():
    lines = subprocess.run(sys.argv[1:], check=True, capture_output=True, text=True).stdout.splitlines()
    wrong = 0
    contained = 0
    for line in lines:
        pattern, text, told = line.split("|")
        counted = count(tournament(pattern), tournament(text))
        contained += counted > 0
        if counted != int(told):
            wrong += 1
            print(f"{pattern} in {text}: {told}, NetworkX finds {counted}")
    print(f"{len(lines)} pairs, {contained} contained, {wrong} different")
    return 1 if wrong or not contained else 0


sys.exit(main())
