"""Finds what complements.c prints, with the connected components of the general-purpose graph
library NetworkX (A. Hagberg, D. Schult, P. Swart, Proceedings of SciPy 2008; Debian:
python3-networkx).

Nodes are the sets of positions of the result whose deletion leaves the permutation, found by
trying all of them; an edge joins two sets that differ in one position.
"""

import itertools
import subprocess
import sys

try:
    import networkx
except ImportError:
    print("skipped: NetworkX (python3-networkx) is not installed")
    sys.exit(77)


def read(text):
    return [] if text == "()" else [int(word) for word in text.split()]


def pattern(elements):
    order = sorted(elements)
    return [order.index(element) + 1 for element in elements]


def graph_of(permutation, result):
    r = len(result) - len(permutation)
    graph = networkx.Graph()
    for positions in itertools.combinations(range(len(result)), r):
        rest = [element for i, element in enumerate(result) if i not in positions]
        if pattern(rest) == permutation:
            graph.add_node(frozenset(positions))
    for one, other in itertools.combinations(list(graph), 2):
        if len(one & other) == r - 1:
            graph.add_edge(one, other)
    return graph


def main():
    lines = subprocess.run(sys.argv[1:], check=True, capture_output=True, text=True).stdout.splitlines()
    wrong = 0
    several = 0
    for line in lines:
        permutation, result, count, classes = line.split("|")
        graph = graph_of(read(permutation), read(result))
        components = networkx.number_connected_components(graph)
        several += components > 1
        if (len(graph), components) != (int(count), int(classes)):
            wrong += 1
            print(f"{permutation} in {result}: {count} sets, {classes} classes, "
                  f"NetworkX finds {len(graph)} and {components}")
    print(f"{len(lines)} results, {several} with several classes, {wrong} different")
    return 1 if wrong or not several else 0


sys.exit(main())
