"""Calls the service at argv[1] with the client that openapi-python-client made of its document."""

import sys

from redfathom_client import Client
from redfathom_client.api.convert import convert, list_quantities
from redfathom_client.api.models import list_models
from redfathom_client.models import (
    ConvertAnswer,
    ConvertRequest,
    DarkEnergyConstant,
    DarkEnergyConstantForm,
    DeclaredModel,
    From,
    InvertibleQuantityName,
    OutputRequest,
    Problem,
    QuantityName,
)

client = Client(base_url=sys.argv[1])
model = DeclaredModel(
    hubble_constant=70.0,
    matter=0.3,
    dark_energy=DarkEnergyConstant(form=DarkEnergyConstantForm.CONSTANT, w=-0.9),
)

# Forward: an array with a null, another unit.
forward = convert.sync(
    client=client,
    body=ConvertRequest(
        model=model,
        from_=From(quantity=InvertibleQuantityName.REDSHIFT, values=[0.5, None, 7.3]),
        to=[QuantityName.AGE, OutputRequest(quantity=QuantityName.LUMINOSITY_DISTANCE, unit="Gpc")],
    ),
)
assert isinstance(forward, ConvertAnswer), forward
first, second, third = forward.columns.age.values
assert first > third > 0 and second is None, forward.columns.age
assert forward.columns.luminosity_distance.unit == "Gpc"
assert [(remark.row, remark.code) for remark in forward.remarks] == [(1, "missing")]
assert forward.model.fingerprint.startswith("rf1-")

# And back.
inverse = convert.sync(
    client=client,
    body=ConvertRequest(
        model=model,
        from_=From(quantity=InvertibleQuantityName.AGE, values=first),
        to=[QuantityName.REDSHIFT],
    ),
)
assert isinstance(inverse, ConvertAnswer), inverse
assert abs(inverse.columns.redshift.values[0] - 0.5) < 1e-13, inverse

# Without a model or outputs: the default of each.
usual = convert.sync(
    client=client, body=ConvertRequest(from_=From(quantity=InvertibleQuantityName.REDSHIFT, values=[1.0]))
)
assert isinstance(usual, ConvertAnswer) and usual.model.defaulted is True, usual

# A problem has its type.
refused = convert.sync_detailed(
    client=client,
    body=ConvertRequest(
        model=DeclaredModel(hubble_constant=70.0, matter=-0.3),
        from_=From(quantity=InvertibleQuantityName.REDSHIFT, values=[1.0]),
    ),
)
assert refused.status_code == 400 and isinstance(refused.parsed, Problem), refused
assert refused.parsed.code == "out_of_range", refused.parsed
assert refused.parsed.errors[0].pointer == "/model/matter", refused.parsed

# Lists.
models = list_models.sync(client=client)
assert models.default in [entry.name for entry in models.models]
assert len(list_quantities.sync(client=client).quantities) > 30
print("Python client: all calls as expected")
