"""Plane elasticity on a given mesh, solved by DOLFINx: the outside check of raiser's finite elements.

Usage: dolfinx_solve.py MESHES.json ANSWERS.json CACHE_DIR   solve exported meshes
       dolfinx_solve.py --self-test CACHE_DIR                check this program on closed forms

MESHES.json is a list of meshes, each (lengths mm, stresses MPa):
  reference     reference coordinates (r, s), r, s >= 0 and r + s <= 1, of the geometry nodes of one
                triangle, corners first as (0,0), (1,0), (0,1); as many as a polynomial of degree g has
  vertices      for each triangle its three global vertex numbers, anticlockwise
  nodes         for each triangle its node positions (x, y), in the order of `reference`
  degree        of the displacement
  quadrature    degree up to which integrals are exact (optional)
  material      {"youngs_modulus", "poissons_ratio", "plane": "stress" or "strain"}
  thickness     mm
  tractions     list of {"stress": [xx, yy, xy], "sides": [[triangle, side], ...]}: traction = stress * normal;
                side k joins corners k and k + 1
  pins          list of {"vertex": number, "component": 0 or 1}: displacement 0
  samples       reference points (r, s) at which every triangle's displacement is wanted

ANSWERS.json, a list in the same order: positions and displacements [triangle][sample] -> (x, y), mm; strain_energy and external_work, N mm.
"""

import json
import logging
import os
import sys

import numpy as np

TOLERANCE = 1e-11


def monomials(points, degree):
    points = np.asarray(points, dtype=float)
    powers = [(i, j) for i in range(degree + 1) for j in range(degree + 1 - i)]
    return np.stack([points[:, 0] ** i * points[:, 1] ** j for i, j in powers], axis=1)


def change_nodes(reference, new_reference):
    """Matrix from node positions at `reference` to those at `new_reference`, same polynomial space."""
    degree = int(round((np.sqrt(8 * len(reference) + 1) - 3) / 2))
    if (degree + 1) * (degree + 2) // 2 != len(reference):
        raise ValueError(f"{len(reference)} nodes make no complete polynomial on a triangle; give (g+1)(g+2)/2")
    return degree, np.linalg.solve(monomials(reference, degree).T, monomials(new_reference, degree).T).T


def global_nodes(vertices, positions, lattice):
    """Numbers the nodes of all triangles, shared ones once: (cells, coordinates).

    A node on a side is known by the side's two vertices and its distance from the smaller one.
    """
    numbers, coordinates, cells = {}, [], []
    for triangle, (corners, nodes) in enumerate(zip(vertices, positions)):
        cell = []
        for (r, s), x in zip(lattice, nodes):
            weights = {corners[0]: 1 - r - s, corners[1]: r, corners[2]: s}
            on = tuple(sorted((v, round(w, 9)) for v, w in weights.items() if abs(w) > 1e-12))
            key = on if len(on) < 3 else (triangle, on)
            if key not in numbers:
                numbers[key] = len(coordinates)
                coordinates.append(x)
            elif np.linalg.norm(coordinates[numbers[key]] - x) > 1e-9 * np.ptp(positions.reshape(-1, 2), axis=0).max():
                raise ValueError(f"triangle {triangle}: a shared node lies at {x} here, at {coordinates[numbers[key]]} there")
            cell.append(numbers[key])
        cells.append(cell)
    return np.array(cells, dtype=np.int64), np.array(coordinates)


class Plate:
    """The mesh in DOLFINx, with the way back to the triangles' own order."""

    def __init__(self, given):
        import basix
        import dolfinx
        import ufl
        from mpi4py import MPI

        vertices = np.array(given["vertices"])
        degree = change_nodes(given["reference"], given["reference"])[0]
        # DOLFINx 0.5 lays out the nodes of a mesh evenly. Its form compiler must be told: left to
        # itself it chooses by what was compiled before.
        element = ufl.VectorElement("Lagrange", ufl.triangle, degree, variant="equispaced")
        evenly = basix.LagrangeVariant.equispaced
        lattice = basix.create_element(basix.ElementFamily.P, basix.CellType.triangle, degree, evenly).points
        matrix = change_nodes(given["reference"], lattice)[1]
        positions = np.einsum("ij,cjd->cid", matrix, np.array(given["nodes"], dtype=float))
        cells, coordinates = global_nodes(vertices.tolist(), positions, lattice)
        self.mesh = dolfinx.mesh.create_mesh(MPI.COMM_SELF, cells, coordinates, ufl.Mesh(element))
        self.original = np.array(self.mesh.topology.original_cell_index)  # ours, by DOLFINx's number
        self.local = np.argsort(self.original)  # DOLFINx's number, by ours
        self.corners = vertices
        for dimensions in ((2, 1), (2, 0), (1, 2)):
            self.mesh.topology.create_connectivity(*dimensions)

    def facet(self, triangle, side):
        """The facet on a side: DOLFINx numbers facets by the opposite corner."""
        return self.mesh.topology.connectivity(2, 1).links(self.local[triangle])[(side + 2) % 3]

    def vertex(self, number):
        triangle, corner = np.argwhere(self.corners == number)[0]
        return self.mesh.topology.connectivity(2, 0).links(self.local[triangle])[corner]

    def sample(self, expression, points):
        import dolfinx

        values = dolfinx.fem.Expression(expression, np.array(points, dtype=float)).eval(self.local.astype(np.int32))
        return values.reshape(len(self.local), len(points), 2)


def stress_law(material, mesh):
    """sigma(u) of isotropic elasticity in the plane."""
    import ufl
    from dolfinx.fem import Constant

    modulus, nu = material["youngs_modulus"], material["poissons_ratio"]
    mu = modulus / (2 * (1 + nu))
    if material["plane"] == "stress":
        lame = modulus * nu / (1 - nu**2)
    elif material["plane"] == "strain":
        lame = modulus * nu / ((1 + nu) * (1 - 2 * nu))
    else:
        raise ValueError(f'material.plane is "{material["plane"]}"; write "stress" or "strain"')
    mu, lame = Constant(mesh, mu), Constant(mesh, lame)
    return lambda u: 2 * mu * ufl.sym(ufl.grad(u)) + lame * ufl.div(u) * ufl.Identity(2)


def side_integrals(plate, tractions, v, quadrature):
    """The work of the tractions on v, per unit thickness."""
    import dolfinx
    import ufl

    tags = {}
    for number, traction in enumerate(tractions):
        for triangle, side in traction["sides"]:
            facet = plate.facet(triangle, side)
            if facet in tags:
                raise ValueError(f"triangle {triangle}, side {side}: a second traction on one side; add them up first")
            tags[facet] = number
    facets = np.array(sorted(tags), dtype=np.int32)
    marks = dolfinx.mesh.meshtags(plate.mesh, 1, facets, np.array([tags[f] for f in facets], dtype=np.int32))
    ds = ufl.Measure("ds", domain=plate.mesh, subdomain_data=marks, metadata={"quadrature_degree": quadrature})
    normal = ufl.FacetNormal(plate.mesh)
    work = 0
    for number, traction in enumerate(tractions):
        values = np.array(traction["stress"], dtype=float)
        xx, yy, xy = (dolfinx.fem.Constant(plate.mesh, value) for value in values)
        work += ufl.dot(ufl.dot(ufl.as_matrix([[xx, xy], [xy, yy]]), normal), v) * ds(number)
    return work


def pinned(plate, space, pins):
    import dolfinx

    conditions = []
    for pin in pins:
        part = space.sub(pin["component"])
        vertex = np.array([plate.vertex(pin["vertex"])], dtype=np.int32)
        dofs = dolfinx.fem.locate_dofs_topological(part, 0, vertex)
        conditions.append(dolfinx.fem.dirichletbc(0.0, dofs, part))
    return conditions


def solve(given):
    import dolfinx
    import ufl
    from dolfinx.fem.petsc import LinearProblem

    plate = Plate(given)
    plate.mesh.topology.create_connectivity(0, 2)
    space = dolfinx.fem.VectorFunctionSpace(plate.mesh, ("Lagrange", given["degree"]))
    u, v = ufl.TrialFunction(space), ufl.TestFunction(space)
    quadrature = given.get("quadrature", 2 * given["degree"] + 12)
    dx = ufl.Measure("dx", domain=plate.mesh, metadata={"quadrature_degree": quadrature})
    sigma = stress_law(given["material"], plate.mesh)
    energy = ufl.inner(sigma(u), ufl.sym(ufl.grad(v))) * dx
    work = side_integrals(plate, given["tractions"], v, quadrature)
    options = {"ksp_type": "preonly", "pc_type": "lu"}
    solution = LinearProblem(energy, work, bcs=pinned(plate, space, given["pins"]), petsc_options=options).solve()

    def integral(form):
        return given["thickness"] / 2 * dolfinx.fem.assemble_scalar(dolfinx.fem.form(form))

    return {
        "positions": plate.sample(ufl.SpatialCoordinate(plate.mesh), given["samples"]).tolist(),
        "displacements": plate.sample(solution, given["samples"]).tolist(),
        "strain_energy": integral(ufl.inner(sigma(solution), ufl.sym(ufl.grad(solution))) * dx),
        "external_work": integral(ufl.replace(work, {v: solution})),
    }


def curved_square(degree, geometry, bulge):
    """A 2 x 2 square of four triangles about a vertex off its centre, whose inner sides are
    bent (`bulge`, mm): a constant stress must come out exactly where the displacement's degree
    reaches the geometry's."""
    corners = np.array([[-1, -1], [1, -1], [1, 1], [-1, 1], [0.15, -0.1]], dtype=float)
    vertices = [[0, 1, 4], [1, 2, 4], [2, 3, 4], [3, 0, 4]]
    lattice = [(0, 0), (1, 0), (0, 1)]
    steps = np.arange(1, geometry) / geometry
    lattice += [(t, 0) for t in steps] + [(1 - t, t) for t in steps] + [(0, 1 - t) for t in steps]
    lattice += [(1 / 3, 1 / 3)] if geometry == 3 else []

    def bend(x):
        away = (1 - x[0] ** 2) * (1 - x[1] ** 2)
        return x + bulge * away * np.array([np.sin(2 * x[1]), np.cos(3 * x[0])])

    nodes = [
        [bend((1 - r - s) * corners[a] + r * corners[b] + s * corners[c]).tolist() for r, s in lattice]
        for a, b, c in vertices
    ]
    return {
        "reference": lattice,
        "vertices": vertices,
        "nodes": nodes,
        "degree": degree,
        "material": {"youngs_modulus": 200000.0, "poissons_ratio": 0.3, "plane": "stress"},
        "thickness": 3.0,
        "tractions": [{"stress": [120.0, -45.0, 30.0], "sides": [[t, 0] for t in range(4)]}],
        "pins": [{"vertex": 0, "component": 0}, {"vertex": 0, "component": 1}, {"vertex": 1, "component": 1}],
        "samples": [(0.2, 0.3), (1, 0), (0.5, 0.5), (0.0, 0.7)],
    }


def self_test():
    """Constant stress on a square: displacement and energy from Hooke's law, written out."""
    for geometry, bulge in ((1, 0.0), (2, 0.05), (3, 0.05)):
        for degree in range(geometry, 4):
            for plane in ("stress", "strain"):
                given = curved_square(degree, geometry, bulge)
                given["material"]["plane"] = plane
                answer = solve(given)
                modulus, nu = given["material"]["youngs_modulus"], given["material"]["poissons_ratio"]
                xx, yy, xy = given["tractions"][0]["stress"]
                zz = nu * (xx + yy) if plane == "strain" else 0.0
                exx, eyy = (xx - nu * (yy + zz)) / modulus, (yy - nu * (xx + zz)) / modulus
                gxy = 2 * (1 + nu) * xy / modulus
                x = np.array(answer["positions"])
                exact = np.stack([exx * (x[..., 0] + 1) + gxy * (x[..., 1] + 1), eyy * (x[..., 1] + 1)], axis=-1)
                error = np.abs(np.array(answer["displacements"]) - exact).max() / np.abs(exact).max()
                energy = 4.0 * given["thickness"] * (xx * exx + yy * eyy + xy * gxy) / 2
                energy_error = max(abs(answer[k] / energy - 1) for k in ("strain_energy", "external_work"))
                matrix = change_nodes(given["reference"], given["samples"])[1]
                place_error = np.abs(x - np.einsum("ij,cjd->cid", matrix, np.array(given["nodes"]))).max()
                name = f"geometry {geometry}, displacement {degree}, plane {plane}"
                print(f"{name}: displacement {error:.1e}, energy {energy_error:.1e}, position {place_error:.1e}")
                if not max(error, energy_error, place_error) < TOLERANCE:
                    sys.exit(f"{name}: off by more than {TOLERANCE}")


def main(arguments):
    os.environ["XDG_CACHE_HOME"] = os.path.abspath(arguments[-1])  # before DOLFINx is imported
    logging.disable(logging.INFO)  # not a line for every form compiled
    if arguments[0] == "--self-test":
        self_test()
        return
    with open(arguments[0], encoding="utf-8") as file:
        answers = [solve(given) for given in json.load(file)]
    with open(arguments[1], "w", encoding="utf-8") as file:
        json.dump(answers, file)


if __name__ == "__main__":
    if len(sys.argv) not in (3, 4):
        sys.exit(__doc__)
    main(sys.argv[1:])
