"""Prints what netCDF4-python and xarray find in a NetCDF file, as JSON; numbers as base64 of little-endian float64."""
import base64
import json
import sys

import netCDF4
import numpy
import xarray


def bits(values):
    return base64.b64encode(numpy.ascontiguousarray(values, "<f8").tobytes()).decode()


def plain(attributes):
    return {name: value if isinstance(value, str) else float(value) for name, value in attributes.items()}


def by_netcdf4(group):
    return {
        "attributes": plain({name: group.getncattr(name) for name in group.ncattrs()}),
        "dimensions": {name: len(dimension) for name, dimension in group.dimensions.items()},
        "variables": {
            name: {
                "dims": list(variable.dimensions),
                "dtype": str(variable.dtype),
                "attributes": plain({key: variable.getncattr(key) for key in variable.ncattrs()}),
                "data": bits(variable[...]),
                "chunks": variable.chunking(),
                "gzip": variable.filters()["complevel"] if variable.filters()["zlib"] else 0,
            }
            for name, variable in group.variables.items()
        },
        "groups": {name: by_netcdf4(inner) for name, inner in group.groups.items()},
    }


def by_xarray(path, group):
    with xarray.open_dataset(path, group=group, decode_times=False) as opened:
        variables = {
            name: {"dims": list(variable.dims), "data": bits(variable.values)}
            for name, variable in opened.variables.items()
        }
        coordinates = sorted(opened.coords)
    with xarray.open_dataset(path, group=group) as opened:  # as everyone opens it: with times decoded
        times = [str(time) for time in opened["time"].values[:2]] if "time" in opened else []
    return {"variables": variables, "coordinates": coordinates, "times": times}


def paths(group):
    return [group.path] + [path for inner in group.groups.values() for path in paths(inner)]


path = sys.argv[1]
with netCDF4.Dataset(path) as root:
    root.set_auto_mask(False)
    found = {"format": root.data_model, "netcdf4": by_netcdf4(root), "xarray": {}}
    groups = paths(root)
for group in groups:
    found["xarray"][group.lstrip("/")] = by_xarray(path, group)
print(json.dumps(found))
