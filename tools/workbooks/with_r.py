"""R's write.csv and write.csv2."""
import os
import subprocess
import tempfile

R = subprocess.run(["Rscript", "--version"], capture_output=True, text=True, check=True)
R = "R " + (R.stdout + R.stderr).split("version ")[1].split(" ")[0]


def write(kind, encoding, rows):
    """`rows`: lists of texts and numbers, the names first."""
    script = os.path.join(os.path.dirname(os.path.abspath(__file__)), "write_csv.R")
    with tempfile.TemporaryDirectory() as folder:
        source, target = os.path.join(folder, "in.tsv"), os.path.join(folder, "out.csv")
        with open(source, "w", encoding="utf-8") as file:
            file.writelines("\t".join("NA" if cell is None else str(cell) for cell in row) + "\n" for row in rows)
        environment = {**os.environ, "LC_ALL": "C.UTF-8"}
        subprocess.run(["Rscript", script, kind, encoding, source, target], check=True, capture_output=True, env=environment)
        with open(target, "rb") as file:
            return file.read()
