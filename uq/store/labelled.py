"""Stored variables as xarray has them."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any

import numpy as np
import xarray

from uq.store.encode import StoredVariable


def labelled(name: str, variable: StoredVariable, coordinates: Mapping[str, StoredVariable]) -> xarray.DataArray:
    """A variable with the coordinates of its dimensions, just as xarray reads it from the file."""
    coords = {dim: _variable(coordinates[dim]) for dim in variable.dims if dim in coordinates}
    return xarray.DataArray(_variable(variable), coords=coords, name=name)


def _variable(stored: StoredVariable) -> xarray.Variable:
    attributes = dict(stored.attributes)
    missing = attributes.pop("_FillValue", None)
    return xarray.Variable(stored.dims, _plain(stored.data, missing), attributes)


def _plain(data: np.ndarray[Any, Any], missing: Any) -> np.ndarray[Any, Any]:
    if data.dtype.kind == "O":
        return np.array(data.tolist(), dtype=np.str_).reshape(data.shape)
    if missing is not None and data.dtype.kind in "iu":
        return np.where(data == missing, np.nan, data)
    return data
