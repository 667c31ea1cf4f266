#include "io/write/vtu.hpp"

#include <vtkCellType.h>
#include <vtkDoubleArray.h>
#include <vtkFieldData.h>
#include <vtkFloatArray.h>
#include <vtkHigherOrderTriangle.h>
#include <vtkNew.h>
#include <vtkPointData.h>
#include <vtkPoints.h>
#include <vtkStringArray.h>
#include <vtkUnstructuredGrid.h>
#include <vtkXMLUnstructuredGridWriter.h>

#include <algorithm>
#include <array>
#include <initializer_list>

namespace raiser::io {
namespace {

using solver::FieldValue;

template <class Array>
void shape(Array* array, const char* name, std::initializer_list<const char*> components, vtkIdType tuples) {
  array->SetName(name);
  array->SetNumberOfComponents(std::max(1, static_cast<int>(components.size())));
  int i = 0;
  for (const char* component : components) array->SetComponentName(i++, component);
  array->SetNumberOfTuples(tuples);
}

// The arrays of the point data, all of the same length.
struct PointArrays {
  vtkNew<vtkDoubleArray> displacement;
  vtkNew<vtkFloatArray> stress, largest, smallest, von_mises;

  PointArrays(vtkPointData* data, vtkIdType points) {
    shape(displacement.Get(), "displacement, mm", {"X", "Y", "Z"}, points);
    shape(stress.Get(), "stress, MPa", {"XX", "YY", "ZZ", "XY", "YZ", "XZ"}, points);
    shape(largest.Get(), "largest principal stress, MPa", {}, points);
    shape(smallest.Get(), "smallest principal stress, MPa", {}, points);
    shape(von_mises.Get(), "von Mises stress, MPa", {}, points);
    data->AddArray(displacement);
    for (vtkFloatArray* array : {stress.Get(), largest.Get(), smallest.Get(), von_mises.Get()}) {
      data->AddArray(array);
    }
    data->SetActiveScalars(von_mises->GetName());
    data->SetActiveVectors(displacement->GetName());
  }

  void set(vtkIdType id, const FieldValue& at) {
    const solver::Stress& s = at.stress;
    const Eigen::Vector2d main = solver::principal(s);
    displacement->SetTuple3(id, at.displacement.x(), at.displacement.y(), 0.0);
    const std::array<double, 6> components{s.xx, s.yy, s.zz, s.xy, 0.0, 0.0};
    stress->SetTuple(id, components.data());
    largest->SetValue(id, static_cast<float>(main(0)));
    smallest->SetValue(id, static_cast<float>(main(1)));
    von_mises->SetValue(id, static_cast<float>(solver::von_mises(s)));
  }
};

void fill(vtkUnstructuredGrid* grid, const CellSource& source) {
  const int degree = std::clamp(source.degree, 1, highest_vtu_degree);
  const std::vector<mesh::Point> nodes = vtk_triangle_nodes(degree);
  const auto per_cell = static_cast<vtkIdType>(nodes.size());
  const auto cells = static_cast<vtkIdType>(source.cells);
  const int type = degree == 1 ? VTK_TRIANGLE : degree == 2 ? VTK_QUADRATIC_TRIANGLE : VTK_LAGRANGE_TRIANGLE;
  vtkNew<vtkPoints> points;
  points->SetDataTypeToDouble();
  points->SetNumberOfPoints(cells * per_cell);
  PointArrays arrays(grid->GetPointData(), cells * per_cell);
  grid->Allocate(cells);
  std::vector<vtkIdType> ids(nodes.size());
  vtkIdType id = 0;
  for (std::size_t cell = 0; cell < source.cells; ++cell) {
    const std::vector<FieldValue> values = source.sample(cell, nodes);
    for (std::size_t i = 0; i < nodes.size(); ++i, ++id) {
      ids[i] = id;
      points->SetPoint(id, values[i].point.x(), values[i].point.y(), 0.0);
      arrays.set(id, values[i]);
    }
    grid->InsertNextCell(type, per_cell, ids.data());
  }
  grid->SetPoints(points);
}

void describe(vtkFieldData* data, const Provenance& provenance) {
  const std::array<std::pair<const char*, std::string>, 4> entries{{
      {"raiser version", provenance.version},
      {"compiler", provenance.compiler},
      {"case file", provenance.case_file},
      {"case SHA-256", provenance.case_sha256},
  }};
  for (const auto& [name, value] : entries) {
    vtkNew<vtkStringArray> array;
    array->SetName(name);
    array->InsertNextValue(value);
    data->AddArray(array);
  }
}

}  // namespace

std::vector<mesh::Point> vtk_triangle_nodes(int degree) {
  const int count = (degree + 1) * (degree + 2) / 2;
  std::vector<mesh::Point> nodes;
  nodes.reserve(static_cast<std::size_t>(count));
  for (int i = 0; i < count; ++i) {
    std::array<vtkIdType, 3> index{};
    vtkHigherOrderTriangle::BarycentricIndex(i, index.data(), degree);
    nodes.emplace_back(static_cast<double>(index[0]) / degree, static_cast<double>(index[1]) / degree);
  }
  return nodes;
}

CellSource cells_of(const solver::Field& field) {
  return {field.cells(), field.degree(), [&field](std::size_t cell, std::span<const mesh::Point> reference) {
            return field.sample(cell, reference);
          }};
}

std::string vtu(const CellSource& source, const Provenance& provenance) {
  vtkNew<vtkUnstructuredGrid> grid;
  fill(grid, source);
  describe(grid->GetFieldData(), provenance);
  vtkNew<vtkXMLUnstructuredGridWriter> writer;
  writer->SetInputData(grid);
  writer->SetDataModeToAppended();
  writer->EncodeAppendedDataOff();
  writer->SetCompressorTypeToZLib();
  writer->SetCompressionLevel(1);
  writer->WriteToOutputStringOn();
  writer->Write();
  return writer->GetOutputString();
}

}  // namespace raiser::io
