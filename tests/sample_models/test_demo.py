"""What `make demo` runs."""

from sample_models import demo


def test_the_demo_leaves_a_report_where_it_is_run(monkeypatch, tmp_path, capfd):
    monkeypatch.chdir(tmp_path)
    assert demo.main() == 0
    assert (tmp_path / "demo-joints" / "report.html").stat().st_size > 0
    assert capfd.readouterr().out.rstrip().splitlines()[-1].count("report.html") == 1
