"""LibreOffice without a window: converts files, as a plant does that has no Excel."""
import os
import re
import subprocess
import tempfile


def version():
    said = subprocess.run(["soffice", "--version"], capture_output=True, text=True, check=True).stdout
    return re.search(r"LibreOffice [\d.]+", said).group(0)


LIBREOFFICE = version()


def convert(content, name, target, filters=None):
    """Converts the file `name` with `content` to another ending; `filters` as soffice wants them."""
    with tempfile.TemporaryDirectory() as folder:
        source = os.path.join(folder, name)
        with open(source, "wb") as file:
            file.write(content if isinstance(content, bytes) else content.encode())
        out = os.path.join(folder, "out")
        command = ["soffice", f"-env:UserInstallation=file://{folder}/profile", "--headless", "--convert-to"]
        command += [f"{target}:{filters}" if filters else target]
        if name.endswith(".csv"):
            command += ["--infilter=Text - txt - csv (StarCalc):44,34,76,1,,1031"]
        subprocess.run([*command, "--outdir", out, source], capture_output=True, check=True)
        with open(os.path.join(out, os.path.splitext(name)[0] + "." + target), "rb") as file:
            return file.read()
