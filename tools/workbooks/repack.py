"""Makes a package the same bytes whenever it is written: the parts and their content stay as the writer made them."""
import io
import re
import zipfile

MOMENT = "2026-03-02T00:00:00Z"


def repack(data):
    out = io.BytesIO()
    with zipfile.ZipFile(io.BytesIO(data)) as source, zipfile.ZipFile(out, "w", zipfile.ZIP_DEFLATED) as target:
        for name in source.namelist():
            content = source.read(name)
            if name in ("docProps/core.xml", "meta.xml"):
                content = re.sub(rb"\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d(\.\d+)?Z?(?=<)", MOMENT.encode(), content)
            target.writestr(zipfile.ZipInfo(name), content, zipfile.ZIP_DEFLATED)
    return out.getvalue()


def pack(parts):
    """A package from (name, text or bytes) pairs, with plain zipfile."""
    out = io.BytesIO()
    with zipfile.ZipFile(out, "w", zipfile.ZIP_DEFLATED) as target:
        for name, content in parts:
            target.writestr(zipfile.ZipInfo(name), content, zipfile.ZIP_DEFLATED)
    return out.getvalue()
