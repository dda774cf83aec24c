"""Saves a workbook through LibreOffice with a password to open it; needs Debian's python3-uno."""
import os
import subprocess
import tempfile
import time
from pathlib import Path

import uno
from com.sun.star.beans import NamedValue, PropertyValue


def properties(**given):
    return tuple(PropertyValue(Name=name, Value=value) for name, value in given.items())


def protect(content, password):
    with tempfile.TemporaryDirectory() as folder:
        source, target = Path(folder, "open.xlsx"), Path(folder, "shut.xlsx")
        source.write_bytes(content)
        pipe = f"corpus{os.getpid()}"
        office = subprocess.Popen(
            ["soffice", f"-env:UserInstallation=file://{folder}/profile", "--headless", "--norestore", f"--accept=pipe,name={pipe};urp;"],
            stdout=subprocess.DEVNULL,
            stderr=subprocess.DEVNULL,
        )
        try:
            desktop = connect(pipe)
            document = desktop.loadComponentFromURL(source.as_uri(), "_blank", 0, properties(Hidden=True))
            lock = uno.Any("[]com.sun.star.beans.NamedValue", (NamedValue("CryptoType", "Standard"), NamedValue("OOXPassword", password)))
            uno.invoke(document, "storeToURL", (target.as_uri(), properties(FilterName="Calc MS Excel 2007 XML", EncryptionData=lock)))
            document.close(True)
            desktop.terminate()
            office.wait(60)
        finally:
            if office.poll() is None:
                office.terminate()
        return target.read_bytes()


def connect(pipe):
    local = uno.getComponentContext()
    resolver = local.ServiceManager.createInstanceWithContext("com.sun.star.bridge.UnoUrlResolver", local)
    for _ in range(120):
        try:
            context = resolver.resolve(f"uno:pipe,name={pipe};urp;StarOffice.ComponentContext")
            return context.ServiceManager.createInstanceWithContext("com.sun.star.frame.Desktop", context)
        except Exception:  # until the office listens
            time.sleep(0.5)
    raise RuntimeError("LibreOffice did not answer")
